using ChainSolve.Language.Syntax;
using ChainSolve.Numerics.Estimates;
using static ChainSolve.Tests.Measures.HandMeasures;
using static ChainSolve.Tests.Measures.TwoStateTests;

namespace ChainSolve.Tests.Measures;

/// <summary>Chains that stop, split, or do not move at all.</summary>
public class StructureTests
{
    // From the start one goes to the left with chance 1/4 and stays; on the right two states take turns.
    private static HandChain Split() => new("start left right far", null, (0, 1, 1), (0, 2, 3), (2, 3, 2), (3, 2, 6));

    [Fact]
    public void Steady_SeveralClasses_WeighsByChance_AndWarns()
    {
        var chain = Split();
        var (result, answer) = chain.SolveAll(null, Steady(MeasureKind.Probability, chain.In("left", "far")))[0];
        Holds(0.25 + (0.75 * 0.25), result);
        var warning = Assert.Single(answer.Warnings);
        Assert.Equal("N201", warning.Code);
        Assert.Equal(
            "the model can end in 2 groups of states that it never leaves; steady values weigh them by the chance of each: "
            + "0.75 for 'right' and 1 more, 0.25 for 'left'",
            warning.Message);
    }

    [Fact]
    public void Steady_StateThatIsLeftForGood_Zero()
    {
        var chain = Split();
        Zero(chain.Solve(Steady(MeasureKind.Probability, chain.In("start"))));
        Zero(chain.Solve(Steady(MeasureKind.Entries, chain.In("left"))));
    }

    [Fact]
    public void MeanTime_MayNeverBeMet_InfiniteWithReason()
    {
        var chain = Split();
        var point = Assert.Single(chain.Solve(TimeTo(MeasureKind.MeanTime, chain.In("far"))).Points);
        Assert.True(double.IsPositiveInfinity(point.Value));
        Assert.Equal("the condition is never met with a chance of 0.25: the model can come to 'left' and stay there", point.Reason);
        Assert.Equal(SolveStatus.Ok, point.Status);
        var deviation = Assert.Single(chain.Solve(TimeTo(MeasureKind.DeviationTime, chain.In("far"))).Points);
        Assert.True(double.IsPositiveInfinity(deviation.Value));
        var group = Assert.Single(chain.Solve(TimeTo(MeasureKind.MeanTime, chain.In("left"))).Points);
        Assert.Equal("the condition is never met with a chance of 0.75: the model can come to a group of 2 states around 'right' and stay there", group.Reason);
    }

    [Fact]
    public void Quantile_ShareAboveTheChance_InfiniteWithReason()
    {
        var chain = Split();
        var point = Assert.Single(chain.Solve(TimeTo(MeasureKind.QuantileTime, chain.In("left"), 0.5)).Points);
        Assert.True(double.IsPositiveInfinity(point.Value));
        Assert.Equal("the condition is ever met with the chance 0.25 only, which is below 0.5", point.Reason);
        var all = Assert.Single(chain.Solve(TimeTo(MeasureKind.QuantileTime, chain.In("left", "right"), 1)).Points);
        Assert.Equal("at no time has the condition been met for certain", all.Reason);
    }

    [Fact]
    public void MeanTime_ToWhatNeverHolds_Infinite()
    {
        var chain = new HandChain("up down", null, (0, 1, 1), (1, 0, 2));
        Assert.True(double.IsPositiveInfinity(chain.Solve(TimeTo(MeasureKind.MeanTime, chain.In())).Value));
        Zero(chain.Solve(Over(MeasureKind.Onset, chain.In(), 7)));
        Zero(chain.Solve(Over(MeasureKind.Reliability, chain.In(), 7)));
    }

    [Fact]
    public void TotalUntil_EarningsWithoutEnd_InfiniteWithReason()
    {
        var chain = Split();
        var point = Assert.Single(chain.Solve(TotalUntil(chain.Earns(0, 2, 0, 0), chain.In("right"))).Points);
        Assert.True(double.IsPositiveInfinity(point.Value));
        Assert.Equal("the total may grow without end: the model can come to 'left' and stay there", point.Reason);
        var loss = Assert.Single(chain.Solve(TotalUntil(chain.Earns(1, -2, 0, 0), chain.In("right"))).Points);
        Assert.True(double.IsNegativeInfinity(loss.Value));
        Holds(0.25, chain.Solve(TotalUntil(chain.Earns(1, 0, 0, 0), chain.In("right"))));
    }

    [Fact]
    public void TotalUntil_GainsAndLossesWithoutEnd_NoValue()
    {
        var chain = new HandChain("start left right goal", null, (0, 1, 1), (0, 2, 1), (0, 3, 1));
        var result = chain.Solve(TotalUntil(chain.Earns(0, 1, -1, 0), chain.In("goal")));
        Assert.Equal(SolveStatus.Failed, result.Status);
        Assert.Empty(result.Points);
        Assert.StartsWith("both what is gained and what is lost", result.Reason, StringComparison.Ordinal);
    }

    [Fact]
    public void MeanSpell_NeverEnds_InfiniteWithReason()
    {
        var chain = Split();
        var point = Assert.Single(chain.Solve(Steady(MeasureKind.MeanSpell, chain.In("left", "right", "far"))).Points);
        Assert.True(double.IsPositiveInfinity(point.Value));
        Assert.Equal("in the long run the condition does not end once it holds", point.Reason);
    }

    [Fact]
    public void MeanSpell_NeverHolds_NoValue()
    {
        var chain = Split();
        var result = chain.Solve(Steady(MeasureKind.MeanSpell, chain.In()));
        Assert.Equal(SolveStatus.Failed, result.Status);
        Assert.Equal("the condition never holds in the long run, so that it has no spells", result.Reason);
    }

    [Fact]
    public void OneState_EveryMeasure_HasItsValue()
    {
        var chain = new HandChain("only", null);
        var (only, never) = (chain.In("only"), chain.In());
        Holds(1, chain.Solve(At(MeasureKind.Probability, only, 5)));
        Holds(1, chain.Solve(Steady(MeasureKind.Probability, only)));
        Holds(12, chain.Solve(Over(MeasureKind.Total, chain.Earns(3), 4)));
        Holds(3, chain.Solve(Over(MeasureKind.Average, chain.Earns(3), 4)));
        Holds(-3, chain.Solve(Steady(MeasureKind.Expected, chain.Earns(-3))));
        Zero(chain.Solve(Over(MeasureKind.Entries, only, 4)));
        Zero(chain.Solve(TimeTo(MeasureKind.MeanTime, only)));
        Assert.True(double.IsPositiveInfinity(chain.Solve(TimeTo(MeasureKind.MeanTime, never)).Value));
        Assert.True(double.IsPositiveInfinity(chain.Solve(Steady(MeasureKind.MeanSpell, only)).Value));
    }

    [Fact]
    public void ZeroRates_NothingMoves()
    {
        var chain = new HandChain("up down", [0.75, 0.25], (0, 1, 0));
        var down = chain.In("down");
        Holds(0.25, chain.Solve(At(MeasureKind.Probability, down, 1e9)));
        Holds(0.25, chain.Solve(Over(MeasureKind.Onset, down, 1e9)));
        Holds(0.25, chain.Solve(Steady(MeasureKind.Probability, down)));
        Zero(chain.Solve(Steady(MeasureKind.Entries, down)));
        Zero(chain.Solve(Over(MeasureKind.Entries, down, 3)));
    }
}
