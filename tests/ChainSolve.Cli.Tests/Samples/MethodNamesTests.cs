using ChainSolve.Numerics.Absorption;
using ChainSolve.Numerics.Stationary;
using ChainSolve.Numerics.Transient;
using ChainSolve.Tests.Shared.Files;

namespace ChainSolve.Cli.Tests.Samples;

/// <summary>The pages name the methods that there are.</summary>
public class MethodNamesTests
{
    [Fact]
    public void CommandsPage_OptionMethod_ListsEveryMethodOfEveryJob()
    {
        var line = Repository.Read("docs", "commands.md").Split('\n').Single(l => l.StartsWith("| `--method", StringComparison.Ordinal));

        Assert.Contains(Listed("transient", TransientSolvers.All.Select(s => s.Name)), line, StringComparison.Ordinal);
        Assert.Contains(Listed("stationary", StationarySolvers.All.Select(s => s.Name)), line, StringComparison.Ordinal);
        Assert.Contains(Listed("absorption", AbsorptionSolvers.All.Select(s => s.Name)), line, StringComparison.Ordinal);
    }

    [Fact]
    public void NumericsPage_EveryMethod_IsExplained()
    {
        var page = Repository.Read("docs", "numerics.md");
        var names = TransientSolvers.All.Select(s => s.Name).Concat(StationarySolvers.All.Select(s => s.Name)).Concat(AbsorptionSolvers.All.Select(s => s.Name));

        Assert.All(names, name => Assert.Contains($"`{name}`", page, StringComparison.Ordinal));
    }

    private static string Listed(string job, IEnumerable<string> names) => $"`{job}=` {string.Join(", ", names.Select(n => $"`{n}`"))}";
}
