using ChainSolve.Language.Syntax;
using ChainSolve.Measures;
using ChainSolve.Numerics.Estimates;
using ChainSolve.Numerics.Iteration;
using ChainSolve.Numerics.Transient;
using static ChainSolve.Tests.Measures.HandMeasures;

namespace ChainSolve.Tests.Measures;

/// <summary>How measures share work, and how their accuracy is judged.</summary>
public class MeasurePlanTests
{
    private static HandChain Unit() => new("up down", null, (0, 1, 0.25), (1, 0, 1.75));

    [Fact]
    public void Groups_MeasuresThatCanShare_OnePassEach()
    {
        var unit = Unit();
        var asks = new[]
        {
            At(MeasureKind.Probability, unit.In("down"), 1, 2),
            Over(MeasureKind.Total, unit.Earns(1, 2), 5),
            Over(MeasureKind.Entries, unit.In("down"), 3),
            Over(MeasureKind.Reliability, unit.In("up"), 3),
            Over(MeasureKind.Onset, unit.In("down"), 3),
            Steady(MeasureKind.Probability, unit.In("up")),
            Steady(MeasureKind.MeanSpell, unit.In("up")),
            TimeTo(MeasureKind.MeanTime, unit.In("down")),
            TimeTo(MeasureKind.DeviationTime, unit.In("down")),
            TotalUntil(unit.Earns(1, 1), unit.In("down")),
            TimeTo(MeasureKind.MeanTime, unit.In("up")),
        };
        var plan = MeasurePlan.Of(asks, new MeasureContext(unit, SolveOptions.Default, CancellationToken.None));
        Assert.Equal([3, 2, 2, 3, 1], plan.Groups.Select(g => g.Apart().Count));
    }

    [Fact]
    public void Groups_LongCurveBesideManyMoments_PassesOfTheirOwn()
    {
        // On a chain this small the sums cost more than the pass: 3,000 times for 10 rewards that are wanted at one time only.
        var unit = Unit();
        var moments = Enumerable.Range(1, 10).Select(i => Over(MeasureKind.Total, unit.Earns(i, 2), 5));
        var curve = At(MeasureKind.Probability, unit.In("down"), [.. Enumerable.Range(1, 3000).Select(i => (double)i)]);
        var context = new MeasureContext(unit, SolveOptions.Default, CancellationToken.None);
        Assert.Equal([10, 1], MeasurePlan.Of([.. moments, curve], context).Groups.Select(g => g.Apart().Count));
    }

    [Fact]
    public void Run_MeasuresTogether_SameDigitsAsAlone()
    {
        var unit = Unit();
        var asks = new[]
        {
            At(MeasureKind.Probability, unit.In("down"), 1, 2),
            Over(MeasureKind.Total, unit.Earns(1, -2), 5),
            Over(MeasureKind.Onset, unit.In("down"), 3),
            TimeTo(MeasureKind.DeviationTime, unit.In("down")),
        };
        var together = unit.SolveAll(null, asks);
        foreach (var (ask, (result, _)) in asks.Zip(together))
        {
            Assert.Equal(unit.Solve(ask).Points.Select(p => p.Value), result.Points.Select(p => p.Value), (a, b) => Math.Abs(a - b) <= 1e-15 * Math.Abs(b));
        }
    }

    [Fact]
    public void Run_OneMeasureFails_OthersKeepTheirValues()
    {
        var unit = Unit();
        var results = unit.SolveAll(
            new SolveOptions { TransientSolvers = [new Fake(largest: 10)], Tolerance = 0.01 },
            At(MeasureKind.Probability, unit.In("down"), 5),
            At(MeasureKind.Probability, unit.In("up"), 50));
        Assert.Equal([SolveStatus.Ok, SolveStatus.Failed], results.Select(r => r.Result.Status));
        Assert.Equal(7, results[0].Result.Value);
        Assert.Equal("fake failed: too late", results[1].Result.Reason);
        var failure = Assert.Throws<NotConvergedException>(() => results[1].Result.Value);
        Assert.Equal("asked: fake failed: too late", failure.Message);
    }

    [Fact]
    public void Run_OwnSolver_IsNamed()
    {
        var unit = Unit();
        var result = unit.Solve(At(MeasureKind.Probability, unit.In("down"), 5), new SolveOptions { TransientSolvers = [new Fake(10)] });
        Assert.Equal(("fake", "it takes the least work by its own account", "made up"), (result.Method, result.Why, result.How));
    }

    [Fact]
    public void Run_BoundWiderThanAsked_Short()
    {
        var unit = Unit();
        var ask = At(MeasureKind.Probability, unit.In("down"), 5, 6);
        var options = new SolveOptions { TransientSolvers = [new Fake(10)] };
        Assert.Equal(SolveStatus.Ok, unit.Solve(ask, options with { Tolerance = 0.01 / 7 * 1.001 }).Status);
        var result = unit.Solve(ask, options with { Tolerance = 0.001 });
        Assert.Equal(SolveStatus.Short, result.Status);
        Assert.Equal(SolveStatus.Short, result.Points[0].Status);
        Assert.Equal("an error bound is wider than the 1e-3 of the value that was asked for", result.Reason);
        Assert.Equal(SolveStatus.Ok, unit.Solve(ask, options with { Tolerance = 0.001, Negligible = 8 }).Status);
    }

    [Fact]
    public void Run_SignedReward_JudgedAgainstTheSumOfBothParts()
    {
        // Gains and losses of 7 each cancel; their errors do not.
        var unit = Unit();
        var result = unit.Solve(At(MeasureKind.Expected, unit.Earns(1, -1), 5), new SolveOptions { TransientSolvers = [new Fake(10)], Tolerance = 0.002 });
        var point = Assert.Single(result.Points);
        Assert.Equal(0, point.Value);
        Assert.Equal(0.02, point.ErrorBound, 1e-12);
        Assert.Equal(SolveStatus.Ok, point.Status);
    }

    [Fact]
    public void Run_Cancelled_Throws()
    {
        var unit = Unit();
        var context = new MeasureContext(unit, SolveOptions.Default, new CancellationToken(true));
        Assert.Throws<OperationCanceledException>(() => MeasurePlan.Of([At(MeasureKind.Probability, unit.In("up"), 1)], context).Run(context));
    }

    /// <summary>A method that says 7 to within 0.01, whatever it is asked, up to a largest time.</summary>
    private sealed class Fake(double largest) : ITransientSolver
    {
        public string Name => "fake";

        public double Cost(TransientProblem problem) => 1;

        public TransientResult Solve(TransientProblem problem, SolveContext context) => problem.Times.Max() > largest
            ? throw new NotConvergedException("too late")
            : new TransientResult
            {
                Rates = [.. problem.Times.Select(_ => problem.Rates.Select(_ => new Estimate(7, 0.01, false)).ToArray())],
                Totals = [.. problem.Times.Select(_ => problem.Totals.Select(_ => new Estimate(7, 0.01, false)).ToArray())],
                Distributions = null,
                DistributionBounds = null,
                How = "made up",
            };
    }
}
