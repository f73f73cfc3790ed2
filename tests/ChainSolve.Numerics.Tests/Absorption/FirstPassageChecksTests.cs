using ChainSolve.Numerics.Absorption;
using ChainSolve.Numerics.Estimates;
using ChainSolve.Numerics.Iteration;
using ChainSolve.Numerics.Tests.Support;
using ChainSolve.Tests.Shared.Checks;
using ChainSolve.Tests.Shared.Reference;

namespace ChainSolve.Numerics.Tests.Absorption;

/// <summary>The first-passage values of the files of checks; each case names its source and how it was obtained.</summary>
public class FirstPassageChecksTests
{
    private static readonly string[] Asks = ["mean-time", "moment", "total-until", "ends-in"];

    public static TheoryData<string, string> Ids
    {
        get
        {
            var data = new TheoryData<string, string>();
            foreach (var check in CheckFiles.All.Where(c => c.Chain is not null && Asks.Contains(c.Ask.What)))
            {
                data.Add(check.Id, "gth");
                data.Add(check.Id, "sparse-gth");
            }

            return data;
        }
    }

    [Fact]
    public void Ids_OfAllFiles_AreThere() => Assert.True(Ids.Count > 50, $"There are only {Ids.Count}.");

    [Theory]
    [MemberData(nameof(Ids))]
    public void Solve_ACase_HasItsDigits(string id, string method)
    {
        var check = CheckFiles.Find(id);
        var chain = ConcreteChain.From(check.Chain!);
        var target = chain.Select(check.Ask.What == "ends-in" ? check.Ask.Of : check.Ask.To, null);
        bool[] alive = [.. Enumerable.Range(0, chain.Count).Select(i => !target.Contains(i))];
        var passage = FirstPassage.Solve(
            Chains.Of(chain), chain.Start, alive, check.Ask.Order ?? 1, new SolverOptions { Absorption = method });
        Estimate estimate = check.Ask.What switch
        {
            "mean-time" => passage.MeanTime,
            "moment" => passage.Moment(check.Ask.Order!.Value),
            "total-until" => passage.Reward(chain.Rewards(check.Ask.Rewards!.Value)),
            _ => passage.ChanceOfLeaving,
        };

        var distance = Chains.Distance(estimate.Value * check.Ask.Scale, BigFloat.Parse(check.Expected));
        Assert.InRange(distance, 0, Math.Min(check.Tolerance, 1e-14));
        Assert.InRange(estimate.Bound, 0, 1e-14 * estimate.Value);
    }
}
