using ChainSolve.Numerics.Iteration;
using ChainSolve.Numerics.Stationary;
using ChainSolve.Numerics.Tests.Support;
using ChainSolve.Tests.Shared.Checks;
using ChainSolve.Tests.Shared.Reference;

namespace ChainSolve.Numerics.Tests.Stationary;

/// <summary>The long-run values of the files of checks; each case names its source and how it was obtained.</summary>
public class StationaryChecksTests
{
    private static readonly string[] Asks = ["probability", "expected", "ratio", "frequency", "mean-spell", "offered-traffic"];

    public static TheoryData<string, string> Ids
    {
        get
        {
            var data = new TheoryData<string, string>();
            foreach (var check in CheckFiles.All.Where(c => c.Chain is not null && c.Ask.At is null && Asks.Contains(c.Ask.What)))
            {
                data.Add(check.Id, "sparse-gth");
                if (ConcreteChain.From(check.Chain!).Count <= 500)
                {
                    data.Add(check.Id, "gth");
                }
            }

            return data;
        }
    }

    [Fact]
    public void Ids_OfAllFiles_AreThere() => Assert.True(Ids.Count > 80, $"There are only {Ids.Count}.");

    [Theory]
    [MemberData(nameof(Ids))]
    public void Limit_OfACase_HasItsDigits(string id, string method)
    {
        var check = CheckFiles.Find(id);
        var chain = ConcreteChain.From(check.Chain!);
        var result = LongRun.Solve(Chains.Of(chain), chain.Start, new SolverOptions { Stationary = method, Absorption = method });
        var of = check.Ask.Of is null && check.Ask.Levels is null ? [] : chain.Select(check.Ask.Of, check.Ask.Levels);
        var into = check.Ask.What is "frequency" or "mean-spell" ? of : [];
        double Flow() => chain.Moves.Where(m => !into.Contains(m.From) && into.Contains(m.To)).Sum(m => result.Limit[m.From] * m.Rate);
        bool[] set = [.. Enumerable.Range(0, chain.Count).Select(i => of.Contains(i))];
        var value = check.Ask.What switch
        {
            "probability" or "offered-traffic" => result.Probability(set).Value,
            "expected" => result.Expected(chain.Rewards(check.Ask.Rewards!.Value)).Value,
            "ratio" => result.Expected(chain.Rewards(check.Ask.Rewards!.Value)).Value / result.Expected(chain.Rewards(check.Ask.OverRewards!.Value)).Value,
            "frequency" => Flow(),
            _ => result.Probability(set).Value / Flow(),
        };
        var expected = check.Ask.Loss is { } loss ? loss : BigFloat.Parse(check.Expected);

        Assert.InRange(Chains.Distance(value * check.Ask.Scale, expected), 0, Math.Min(check.Tolerance, 1e-14));
    }
}
