using ChainSolve.Numerics.Absorption;
using ChainSolve.Numerics.Estimates;
using ChainSolve.Numerics.Iteration;
using ChainSolve.Numerics.Tests.Support;
using ChainSolve.Tests.Shared.Chains;
using ChainSolve.Tests.Shared.Reference;
using FsCheck.Fluent;
using FsCheck.Xunit;

namespace ChainSolve.Numerics.Tests.Absorption;

public class FirstPassageTests
{
    [Property(MaxTest = 300)]
    public FsCheck.Property Solve_AnyChain_IsWithinItsBoundsOfTheExactValues() => Prop.ForAll(RandomChains.Any(1, 10), chain =>
    {
        var target = chain.Reference.ClosedClasses()[0];
        bool[] alive = [.. Enumerable.Range(0, chain.Count).Select(i => !target.Contains(i))];
        var generator = Chains.Of(chain);
        foreach (var method in new[] { "gth", "sparse-gth" })
        {
            var passage = FirstPassage.Solve(generator, chain.Start, alive, 4, new SolverOptions { Absorption = method });
            Holds(passage.ChanceOfLeaving, chain.Reference.EndsIn(chain.Start, target));
            if (chain.Reference.ClosedClasses().Count > 1)
            {
                continue;
            }

            for (var k = 1; k <= 4; k++)
            {
                Holds(passage.Moment(k), chain.Reference.Moment(chain.Start, target, k));
            }

            Holds(passage.Reward(chain.Rewards), chain.Reference.TotalUntil(chain.Start, target, chain.Rewards));
            var mean = chain.Reference.Moment(chain.Start, target, 1);
            var variance = chain.Reference.Moment(chain.Start, target, 2) - (mean * mean);
            Holds(passage.Variance(), variance);
            Assert.InRange(passage.Variance().Bound, 0, Math.Max(1e-9 * variance.ToDouble(), 1e-300));
        }
    });

    [Theory]
    [InlineData(1e-3, 0.1)]
    [InlineData(1e-6, 1)]
    [InlineData(1e-12, 1)]
    public void MeanTime_OneOfThreeWithOneCrew_IsTheClosedForm(double failure, double repair)
    {
        // (11 l² + 4 l m + m²) / (6 l³): Rausand and Hoyland, System Reliability Theory, 2004 (from memory).
        var chain = Chains.Of(4, (0, 1, 3 * failure), (1, 2, 2 * failure), (2, 3, failure), (1, 0, repair), (2, 1, repair));
        var passage = FirstPassage.Solve(chain, [1, 0, 0, 0], [true, true, true, false], 2);
        var expected = ((11 * failure * failure) + (4 * failure * repair) + (repair * repair)) / (6 * failure * failure * failure);

        Assert.InRange(Chains.Distance(passage.MeanTime.Value, expected), 0, 2e-15);
        Assert.InRange(Chains.Distance(passage.Sojourns[2], 1 / failure), 0, 1e-15);
    }

    [Fact]
    public void Variance_OneOfTwoWithRepair_IsTheSumOfTwoSquares()
    {
        // T is the sum of two independent exponential times with rates s1 and s2, s1 + s2 = 3 l + m, s1 s2 = 2 l².
        var (l, m) = (1e-3, 0.1);
        var passage = FirstPassage.Solve(Chains.Of(3, (0, 1, 2 * l), (1, 2, l), (1, 0, m)), [1, 0, 0], [true, true, false], 2);
        var s1 = ((3 * l) + m + Math.Sqrt((l * l) + (6 * l * m) + (m * m))) / 2;
        var s2 = 2 * l * l / s1;

        Assert.InRange(Chains.Distance(passage.Variance().Value, (1 / (s1 * s1)) + (1 / (s2 * s2))), 0, 1e-14);
    }

    [Fact]
    public void Variance_ALongRowOfEqualStages_DoesNotCancel()
    {
        // Erlang: 2000 stages of rate 1 have mean 2000 and variance 2000.
        const int Stages = 2000;
        var chain = Chains.Of(Stages + 1, [.. Enumerable.Range(0, Stages).Select(i => (i, i + 1, 1.0))]);
        var variance = FirstPassage.Solve(chain, Chains.StartAt(Stages + 1, 0), [.. Enumerable.Range(0, Stages + 1).Select(i => i < Stages)], 2).Variance();

        Assert.InRange(Math.Abs(variance.Value - Stages), 0, variance.Bound);
        Assert.InRange(variance.Bound, 0, 1e-12 * Stages);
    }

    [Fact]
    public void Solve_AStartAmongSeveralStates_AddsItsOwnVariance()
    {
        // Hyperexponential: phases with rates 1/5 and 5 taken with chances 0.32 and 0.68.
        var chain = Chains.Of(3, (0, 2, 0.2), (1, 2, 5));
        var passage = FirstPassage.Solve(chain, [0.32, 0.68, 0], [true, true, false], 2);
        var (mean, second) = ((0.32 * 5) + (0.68 * 0.2), 2 * ((0.32 * 25) + (0.68 * 0.04)));

        Assert.Equal(mean, passage.MeanTime.Value, 1e-15);
        Assert.Equal(second - (mean * mean), passage.Variance().Value, 1e-13);
    }

    [Fact]
    public void Solve_AStartInTheTarget_HasTimeZero()
    {
        var passage = FirstPassage.Solve(Chains.Of(2, (0, 1, 1)), [0, 1], [true, false], 3);

        Assert.Equal(Estimate.Zero, passage.MeanTime);
        Assert.Equal(Estimate.Zero, passage.Variance());
        Assert.Equal(Estimate.Zero, passage.Moment(3));
        Assert.Equal(Estimate.Exact(1), passage.ChanceOfLeaving);
        Assert.Equal("none", passage.Method);
    }

    [Fact]
    public void Solve_AStateWithoutExit_HasAnInfiniteMeanWithAReason()
    {
        var chain = Chains.Of(4, (0, 1, 3), (0, 2, 1), (1, 3, 1));
        var passage = FirstPassage.Solve(chain, [1, 0, 0, 0], [true, true, true, false], 2);

        Assert.Equal(Estimate.Infinite, passage.MeanTime);
        Assert.Equal(Estimate.Infinite, passage.Variance());
        Assert.Contains("state 2", passage.WhyInfinite, StringComparison.Ordinal);
        Assert.Equal(0.75, passage.ChanceOfLeaving.Value);
        Assert.Equal(0.25, passage.ChanceOfStaying.Value);
        Assert.Equal([0.25, 0.75, double.PositiveInfinity, 0], passage.Sojourns);
        Assert.Equal(0.25 + (0.75 * 2), passage.Reward([1, 2, 0, 5]).Value);
        Assert.Equal(Estimate.Infinite, passage.Reward([0, 0, 1e-9, 0]));
        Assert.Contains("state 2", passage.WhyRewardIsInfinite([0, 0, 1, 0]), StringComparison.Ordinal);
        Assert.Null(passage.WhyRewardIsInfinite([1, 1, 0, 1]));
    }

    [Fact]
    public void Solve_AClosedClassOutOfReach_DoesNotMatter()
    {
        var chain = Chains.Of(4, (0, 1, 4), (2, 3, 1), (3, 2, 1));
        var passage = FirstPassage.Solve(chain, [1, 0, 0, 0], [true, false, true, true]);

        Assert.Equal(0.25, passage.MeanTime.Value);
        Assert.True(passage.IsCertain);
    }

    [Fact]
    public void ChanceOfEntering_OneOfTwoEnds_IsItsShare()
    {
        // Drunkard's walk: Grinstead and Snell, ch. 11.2 (from memory): from 1 of 0..4 the end 0 comes first with 3/4.
        var chain = Chains.Of(5, (1, 0, 0.5), (1, 2, 0.5), (2, 1, 0.5), (2, 3, 0.5), (3, 2, 0.5), (3, 4, 0.5));
        var passage = FirstPassage.Solve(chain, [0, 1, 0, 0, 0], [false, true, true, true, false]);

        Assert.Equal(0.75, passage.ChanceOfEntering([true, false, false, false, false]).Value);
        Assert.Equal(0.25, passage.ChanceOfEntering([false, true, true, true, true]).Value);
    }

    [Fact]
    public void MeanTime_BeyondTheRangeOfADouble_IsNoAnswer()
    {
        var n = 40;
        var moves = Enumerable.Range(0, n).Select(i => (i, i + 1, 1e-12)).Concat(Enumerable.Range(1, n - 1).Select(i => (i, i - 1, 1.0)));
        var passage = FirstPassage.Solve(
            Chains.Of(n + 1, [.. moves]), Chains.StartAt(n + 1, 0), [.. Enumerable.Range(0, n + 1).Select(i => i < n)]);

        Assert.True(passage.IsCertain);
        Assert.Contains("1.8e308", Assert.Throws<NotConvergedException>(() => passage.MeanTime).Message, StringComparison.Ordinal);
    }

    [Fact]
    public void Solve_MomentsThatWereNotAnnounced_Throws()
    {
        var passage = FirstPassage.Solve(Chains.Of(2, (0, 1, 1)), [1, 0], [true, false]);

        Assert.Throws<InvalidOperationException>(() => passage.Variance());
        Assert.Throws<ArgumentOutOfRangeException>("order", () => passage.Moment(2));
    }

    [Fact]
    public void Sojourns_OfALargerGrid_AgreeBetweenTheMethods()
    {
        // Corner to corner of a 25 by 25 grid with a drift.
        var grid = Chains.Lattice([25, 25], (a, _) => 1 + (0.3 * a), (_, l) => 1 + (0.01 * l));
        bool[] alive = [.. Enumerable.Range(0, 625).Select(i => i != 624)];
        var dense = FirstPassage.Solve(grid, Chains.StartAt(625, 0), alive, 2, new SolverOptions { Absorption = "gth" });
        var sparse = FirstPassage.Solve(grid, Chains.StartAt(625, 0), alive, 2, new SolverOptions { Absorption = "sparse-gth" });

        for (var i = 0; i < 624; i++)
        {
            Assert.InRange(Chains.Distance(sparse.Sojourns[i], dense.Sojourns[i]), 0, 3e-16);
        }

        Assert.InRange(Chains.Distance(sparse.Variance().Value, dense.Variance().Value), 0, 1e-13);
    }

    private static void Holds(Estimate estimate, BigFloat expected)
    {
        Assert.True(estimate.IsProved);
        Assert.True((estimate.Value - expected).Abs <= estimate.Bound, $"{estimate.Value} ± {estimate.Bound} against {expected}");
    }
}
