using ChainSolve.Cli.Commands;
using ChainSolve.Cli.Tests.Support;

namespace ChainSolve.Cli.Tests.Commands;

public sealed class StarterTests : IDisposable
{
    private readonly TemporaryFolder folder = new();

    [Fact]
    public async Task Run_Name_WritesAModelFile()
    {
        var outcome = await InProcess.RunAsync("starter", folder.File("mine"));

        Assert.Equal(ExitCodes.Done, outcome.ExitCode);
        Assert.Equal("", outcome.Answer);
        Assert.Equal(StarterCommand.Text(), File.ReadAllText(folder.File("mine.chain")));
    }

    [Fact]
    public async Task Run_FileIsThere_IsNotTouched()
    {
        var path = folder.Write("mine.chain", "precious");

        var outcome = await InProcess.RunAsync("starter", path);

        Assert.Equal(ExitCodes.FileProblem, outcome.ExitCode);
        Assert.Equal($"chainsolve: '{path}' is there already; choose another name\n", outcome.Error);
        Assert.Equal("precious", File.ReadAllText(path));
    }

    [Fact]
    public async Task Run_Dash_WritesStandardOutput()
    {
        var outcome = await InProcess.RunAsync("starter", "-");

        Assert.Equal(StarterCommand.Text(), outcome.Answer);
        Assert.Equal("", outcome.Error);
    }

    public void Dispose() => folder.Dispose();
}
