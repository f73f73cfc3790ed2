using ChainSolve.Numerics.Absorption;
using ChainSolve.Numerics.Estimates;
using ChainSolve.Numerics.Iteration;
using ChainSolve.Numerics.Stationary;
using ChainSolve.Numerics.Tests.Support;
using ChainSolve.Tests.Shared.Chains;
using ChainSolve.Tests.Shared.Reference;
using FsCheck.Fluent;
using FsCheck.Xunit;

namespace ChainSolve.Numerics.Tests.Absorption;

public class RestartAbsorptionSolverTests
{
    private static readonly string[] Names = ["gauss-seidel", "multilevel"];

    private static readonly RestartAbsorptionSolver Sweeper = new(new SweepSolver("gauss-seidel", false), 1000);

    [Property(MaxTest = 200)]
    public FsCheck.Property Solve_AnyChainWithOneEnd_IsWithinItsBounds() => Prop.ForAll(RandomChains.Any(1, 10), chain =>
    {
        foreach (var name in Names)
        {
            IsWithinItsBounds(chain, name);
        }
    });

    private static void IsWithinItsBounds(RandomChain chain, string name)
    {
        var ends = chain.Reference.ClosedClasses();
        bool[] alive = [.. Enumerable.Range(0, chain.Count).Select(i => !ends[0].Contains(i))];
        FirstPassage passage;
        try
        {
            passage = FirstPassage.Solve(Chains.Of(chain), chain.Start, alive, 3, new SolverOptions { Absorption = name });
        }
        catch (NotConvergedException)
        {
            return;
        }

        Holds(passage.ChanceOfLeaving, chain.Reference.EndsIn(chain.Start, ends[0]));
        if (ends.Count == 1)
        {
            for (var k = 1; k <= 3; k++)
            {
                Holds(passage.Moment(k), chain.Reference.Moment(chain.Start, ends[0], k));
            }
        }
    }

    [Theory]
    [InlineData("gauss-seidel", 1e-3)]
    [InlineData("gauss-seidel", 1e-6)]
    [InlineData("gauss-seidel", 1e-12)]
    [InlineData("multilevel", 1e-3)]
    [InlineData("multilevel", 1e-12)]
    public void MeanTime_OneOfThree_DoesNotMindHowRareTheEndIs(string name, double failure)
    {
        // (11 l² + 7 l m + 2 m²) / (6 l³) with a crew for each: Trivedi 2002 (from memory).
        var chain = Chains.Of(4, (0, 1, 3 * failure), (1, 2, 2 * failure), (2, 3, failure), (1, 0, 1), (2, 1, 2));
        var passage = FirstPassage.Solve(chain, [1, 0, 0, 0], [true, true, true, false], 2, new SolverOptions { Absorption = name });
        var expected = ((11 * failure * failure) + (7 * failure) + 2) / (6 * failure * failure * failure);

        Assert.InRange(Chains.Distance(passage.MeanTime.Value, expected), 0, 1e-14);
        Assert.InRange(passage.MeanTime.Bound, 0, 1e-12 * expected);
        Assert.InRange(passage.Moment(2).Bound, 0, 1e-11 * passage.Moment(2).Value);
    }

    [Theory]
    [InlineData("gauss-seidel")]
    [InlineData("multilevel")]
    public void Solve_ALargerGrid_AgreesWithTheElimination(string name)
    {
        var grid = Chains.Lattice([20, 20, 10], (a, l) => 0.02 * (a + 1) * (20 - l), (a, _) => 0.9 + (0.1 * a));
        bool[] alive = [.. Enumerable.Range(0, grid.StateCount).Select(i => (i % 20) + (i / 20 % 20) + (i / 400) < 18)];
        var start = Chains.StartAt(grid.StateCount, 0);
        var expected = FirstPassage.Solve(grid, start, alive, 3, new SolverOptions { Absorption = "sparse-gth" });
        var actual = FirstPassage.Solve(grid, start, alive, 3, new SolverOptions { Absorption = name });

        for (var k = 1; k <= 3; k++)
        {
            Assert.InRange(Math.Abs(actual.Moment(k).Value - expected.Moment(k).Value), 0, actual.Moment(k).Bound + expected.Moment(k).Bound);
            Assert.InRange(actual.Moment(k).Bound, 0, 1e-10 * actual.Moment(k).Value);
        }

        Assert.InRange(Chains.Distance(actual.Variance().Value, expected.Variance().Value), 0, 1e-11);
    }

    [Fact]
    public void Solve_EarningsWithoutAStart_AreThere()
    {
        var result = Sweeper.Solve(
            new AbsorptionProblem { Generator = Chains.Of(3, (0, 1, 2), (1, 0, 1), (1, 2, 1)), Alive = [true, true, false], Rewards = [[1, 0, 0]] },
            SolveContext.Default);

        // From 0 the chain is there on average twice, half a unit of time each; from 1 once.
        Assert.InRange(Chains.Distance(result.Earnings[0][0], 1.0), 0, 1e-14);
        Assert.InRange(Chains.Distance(result.Earnings[0][1], 0.5), 0, 1e-14);
        Assert.Equal(0, result.Earnings[0][2]);
    }

    [Fact]
    public void Solve_AGroupThatIsNeverLeft_NamesAState() => Assert.Contains("State 1", Assert.Throws<ArgumentException>(
        () => Sweeper.Solve(
            new AbsorptionProblem { Generator = Chains.Of(3, (0, 1, 2), (0, 2, 1)), Alive = [true, true, false], Starts = [[1, 0, 0]] },
            SolveContext.Default)).Message, StringComparison.Ordinal);

    private static void Holds(Estimate estimate, BigFloat expected) =>
        Assert.True((estimate.Value - expected).Abs <= estimate.Bound, $"{estimate.Value} ± {estimate.Bound} against {expected}");
}
