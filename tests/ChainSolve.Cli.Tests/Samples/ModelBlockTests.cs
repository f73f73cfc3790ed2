using ChainSolve.Cli.Commands;
using ChainSolve.Cli.Tests.Support;
using ChainSolve.Tests.Shared.Files;

namespace ChainSolve.Cli.Tests.Samples;

public class ModelBlockTests
{
    public static TheoryData<string, int> WholeModels()
    {
        var data = new TheoryData<string, int>();
        foreach (var page in new[] { "README.md", "docs/notation.md", "docs/guide.md" })
        {
            var blocks = MarkdownBlock.Read(Repository.Read(page.Split('/')));
            for (var i = 0; i < blocks.Count; i++)
            {
                if (blocks[i].Info == "chain" || blocks[i].Info.StartsWith("chain file=", StringComparison.Ordinal))
                {
                    data.Add(page, i);
                }
            }
        }

        return data;
    }

    [Theory]
    [MemberData(nameof(WholeModels))]
    public async Task Check_WholeModelOfAPage_HasNoFaults(string page, int index)
    {
        var block = MarkdownBlock.Read(Repository.Read(page.Split('/')))[index];

        var outcome = await InProcess.RunAsync(block.Text, ["check", "-"]);

        Assert.True(outcome.ExitCode == ExitCodes.Done, outcome.Error);
    }
}
