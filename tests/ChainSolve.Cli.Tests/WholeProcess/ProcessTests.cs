using System.Runtime.InteropServices;
using ChainSolve.Cli.Commands;
using ChainSolve.Cli.Tests.Support;

namespace ChainSolve.Cli.Tests.WholeProcess;

/// <summary>What only shows in a process of its own: streams, signals, exit codes.</summary>
public sealed class ProcessTests : IDisposable
{
    // 64 million states: still at work when the signal comes.
    private const string Endless =
        """
        model "endless"
        counter a 0 .. 400
        counter b 0 .. 400
        counter c 0 .. 400
        event ua at 1 when a < 400 { a = a + 1 }
        event da at 1 when a > 0 { a = a - 1 }
        event ub at 1 when b < 400 { b = b + 1 }
        event db at 1 when b > 0 { b = b - 1 }
        event uc at 1 when c < 400 { c = c + 1 }
        event dc at 1 when c > 0 { c = c - 1 }
        measure m = probability a = 400 steady
        """;

    private readonly TemporaryFolder folder = new();

    [Fact]
    public async Task Solve_StandardInput_GivesTheAnswerAlone()
    {
        var outcome = await OwnProcess.RunAsync(["solve", "-", "--format", "csv"], StarterCommand.Text());

        Assert.Equal(ExitCodes.Done, outcome.ExitCode);
        Assert.Contains("availability", outcome.Answer, StringComparison.Ordinal);
        Assert.DoesNotContain("\e", outcome.Answer, StringComparison.Ordinal);
    }

    [Theory]
    [InlineData(2, ExitCodes.Interrupted)]
    [InlineData(15, ExitCodes.Terminated)]
    public async Task Solve_Signal_StopsWithItsExitCodeAndNoFile(int signal, int expected)
    {
        if (OperatingSystem.IsWindows())
        {
            return;
        }

        var model = folder.Write("endless.chain", Endless);
        using var process = OwnProcess.Start(["solve", model, "--max-states", "2000000000", "--out", folder.File("answer.txt")]);
        process.StandardInput.Close();
        await AtWorkAsync(process);

        Assert.Equal(0, Kill(process.Id, signal));
        var outcome = await OwnProcess.EndOfAsync(process);

        Assert.Equal(expected, outcome.ExitCode);
        Assert.Equal("", outcome.Answer);
        Assert.Equal("chainsolve: stopped\n", outcome.Error);
        Assert.Equal([model], Directory.GetFiles(folder.Path));
    }

    [Fact]
    public async Task Solve_SignalWhileItWaitsForStandardInput_Stops()
    {
        if (OperatingSystem.IsWindows())
        {
            return;
        }

        using var process = OwnProcess.Start(["solve", "-"]);
        await process.StandardInput.WriteAsync("model");
        await process.StandardInput.FlushAsync();
        await Task.Delay(1000);

        Assert.Equal(0, Kill(process.Id, 2));
        var outcome = await OwnProcess.EndOfAsync(process);

        Assert.Equal(ExitCodes.Interrupted, outcome.ExitCode);
    }

    [Fact]
    public async Task Solve_TimeLimit_EndsWithItsExitCode()
    {
        var model = folder.Write("endless.chain", Endless);

        var outcome = await OwnProcess.RunAsync(["solve", model, "--max-states", "2000000000", "--time-limit", "200 ms"]);

        Assert.Equal(ExitCodes.LimitHit, outcome.ExitCode);
        Assert.Equal("chainsolve: the time limit of 200 ms was hit; raise --time-limit\n", outcome.Error);
    }

    [Fact]
    public async Task Solve_MemoryLimit_EndsWithItsExitCode()
    {
        var model = folder.Write("endless.chain", Endless);

        var outcome = await OwnProcess.RunAsync(["solve", model, "--max-states", "2000000000", "--max-memory", "200MB"]);

        Assert.Equal(ExitCodes.LimitHit, outcome.ExitCode);
        Assert.Matches("^chainsolve: (memory ran out; raise --max-memory|[0-9,]+ states (with|were found so far))", outcome.Error);
    }

    [Fact]
    public async Task Solve_FullDisk_IsAFileProblem()
    {
        if (!File.Exists("/dev/full"))
        {
            return;
        }

        var outcome = await OwnProcess.RunAsync(["solve", "-", "--quiet", "--out", "/dev/full"], StarterCommand.Text());

        Assert.Equal(ExitCodes.FileProblem, outcome.ExitCode);
        Assert.StartsWith("chainsolve: '/dev/full' could not be written: ", outcome.Error, StringComparison.Ordinal);
    }

    public void Dispose() => folder.Dispose();

    // The start of the tool takes a fraction of this; what comes after it is the work.
    private static async Task AtWorkAsync(System.Diagnostics.Process process)
    {
        while (!process.HasExited && process.TotalProcessorTime < TimeSpan.FromSeconds(1))
        {
            await Task.Delay(50);
            process.Refresh();
        }

        Assert.False(process.HasExited, "the model was solved before the signal came");
    }

    [DllImport("libc", EntryPoint = "kill", SetLastError = true)]
    [DefaultDllImportSearchPaths(DllImportSearchPath.SafeDirectories)]
    private static extern int Kill(int process, int signal);
}
