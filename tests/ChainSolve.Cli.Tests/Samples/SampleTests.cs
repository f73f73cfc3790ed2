using ChainSolve.Cli.Tests.Support;
using ChainSolve.Tests.Shared.Files;

namespace ChainSolve.Cli.Tests.Samples;

/// <summary>
/// Runs the commands that pages show. A block marked <c>chain file=NAME</c> is a file; in a block marked <c>console</c> a line
/// that begins with <c>$</c> is a command and the lines below are what it prints.
/// </summary>
public sealed class SampleTests : IDisposable
{
    private const string Prompt = "$ ";
    private const string Tool = "chainsolve ";
    private const string ToolInRepository = "dotnet run --project src/ChainSolve.Cli -c Release -- ";

    private readonly TemporaryFolder folder = new();

    [Theory]
    [InlineData("README.md")]
    [InlineData("docs/guide.md")]
    [InlineData("docs/commands.md")]
    public async Task Page_ConsoleBlocks_ShowWhatTheCommandsPrint(string page)
    {
        var text = Repository.Read(page.Split('/'));
        var lines = text.Split('\n').ToList();
        var blocks = MarkdownBlock.Read(text);
        WriteFiles(blocks);

        var consoles = blocks.Where(block => block.Info == "console").ToList();
        Assert.NotEmpty(consoles);
        foreach (var block in consoles.AsEnumerable().Reverse())
        {
            var printed = await RunAsync(block);
            if (Update.IsWanted)
            {
                lines.RemoveRange(block.FirstLine, block.LineCount);
                lines.InsertRange(block.FirstLine, printed.TrimEnd('\n').Split('\n'));
            }
            else
            {
                Assert.Equal(RunTimes.Hide(printed), RunTimes.Hide(block.Text));
            }
        }

        if (Update.IsWanted)
        {
            await File.WriteAllTextAsync(Repository.PathOf(page.Split('/')), string.Join('\n', lines));
        }
    }

    public void Dispose() => folder.Dispose();

    private void WriteFiles(IReadOnlyList<MarkdownBlock> blocks)
    {
        Directory.CreateSymbolicLink(folder.File("models"), Repository.PathOf("models"));
        foreach (var block in blocks.Where(b => b.Info.StartsWith("chain file=", StringComparison.Ordinal)))
        {
            folder.Write(block.Info["chain file=".Length..], block.Text);
        }
    }

    private async Task<string> RunAsync(MarkdownBlock block)
    {
        var printed = new System.Text.StringBuilder();
        foreach (var command in block.Text.Split('\n').Where(line => line.StartsWith(Prompt, StringComparison.Ordinal)))
        {
            var words = command[Prompt.Length..];
            var tool = words.StartsWith(Tool, StringComparison.Ordinal) ? Tool : ToolInRepository;
            Assert.StartsWith(tool, words, StringComparison.Ordinal);
            var outcome = await OwnProcess.RunAsync([.. System.CommandLine.Parsing.CommandLineParser.SplitCommandLine(words[tool.Length..])], folder: folder.Path);
            printed.Append(command).Append('\n').Append(outcome.Answer).Append(outcome.Error);
        }

        return printed.ToString();
    }
}
