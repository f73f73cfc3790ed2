using ChainSolve.Cli.Commands;
using ChainSolve.Cli.Tests.Support;
using ChainSolve.Tests.Shared.Files;

namespace ChainSolve.Cli.Tests.Faults;

/// <summary>Whole messages: models that people may write by mistake, each with all that the tool says of it.</summary>
public class BrokenModelTests
{
    private const string Mark = "== ";
    private const string Says = "-- says\n";

    private static readonly string[] Place = ["tests", "ChainSolve.Cli.Tests", "Faults", "broken-models.txt"];

    public static TheoryData<string> Titles => [.. Read().Select(c => c.Title)];

    [Theory]
    [MemberData(nameof(Titles))]
    public async Task Solve_BrokenModel_SaysAllThatIsExpected(string title)
    {
        var broken = Read().Single(c => c.Title == title);
        var outcome = await InProcess.RunAsync(broken.Model, ["solve", "-"]);
        Assert.Equal(new Outcome(ExitCodes.ModelFaults, "", broken.Says), outcome);
    }

    [Fact]
    public async Task File_OfBrokenModels_IsWrittenAnewWhenAsked()
    {
        Assert.True(Read().Count >= 40);
        if (Update.IsWanted)
        {
            var blocks = new List<string>();
            foreach (var broken in Read())
            {
                blocks.Add($"{Mark}{broken.Title}\n{broken.Model}\n{Says}{(await InProcess.RunAsync(broken.Model, ["solve", "-"])).Error}");
            }

            File.WriteAllText(Repository.PathOf(Place), string.Join('\n', blocks));
        }
    }

    private static List<(string Title, string Model, string Says)> Read() =>
    [
        .. ("\n" + Repository.Read(Place)).Split("\n" + Mark).Skip(1).Select(block =>
        {
            var (head, says) = block.Split(Says) is [var first, var second] ? (first, second) : (block, "");
            var line = head.IndexOf('\n', StringComparison.Ordinal);
            return (head[..line], head[(line + 1)..].TrimEnd('\n') + "\n", says.Length == 0 ? "" : says.TrimEnd('\n') + "\n");
        }),
    ];
}
