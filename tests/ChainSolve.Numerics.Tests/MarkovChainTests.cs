using ChainSolve.Numerics.Estimates;
using ChainSolve.Numerics.Iteration;
using ChainSolve.Numerics.Tests.Support;

namespace ChainSolve.Numerics.Tests;

public class MarkovChainTests
{
    private const double Failure = 1e-3;
    private const double Repair = 0.1;

    // A two-state unit; its closed forms are those of Barlow and Proschan 1965 (from memory).
    private static readonly MarkovChain Unit = new(Chains.Of(2, (0, 1, Failure), (1, 0, Repair)));

    private static double Availability(double t) => (Repair + (Failure * Math.Exp(-(Failure + Repair) * t))) / (Failure + Repair);

    [Theory]
    [InlineData(null)]
    [InlineData("uniformization")]
    [InlineData("squaring")]
    public void Distribution_OfAUnit_IsTheClosedForm(string? method)
    {
        var grid = Unit.Distributions(Unit.StartAt(0), [50, 0, 7], method);

        Assert.Equal(Estimate.Exact(1).Value, grid[1][0].Value);
        Assert.InRange(Chains.Distance(grid[0][0].Value, Availability(50)), 0, 1e-14);
        Assert.InRange(Chains.Distance(grid[2][0].Value, Availability(7)), 0, 1e-14);
        Assert.InRange(grid[2][1].Bound, 0, 1e-12 * grid[2][1].Value);
        Assert.Equal(grid[2], Unit.Distribution(Unit.StartAt(0), 7, method));
    }

    [Fact]
    public void TransitionMatrix_OfAUnit_HasTheClosedForm()
    {
        var matrix = Unit.TransitionMatrix(7);

        Assert.InRange(Chains.Distance(matrix[0, 0].Value, Availability(7)), 0, 1e-14);
        Assert.InRange(Chains.Distance(matrix[1, 0].Value + matrix[1, 1].Value, 1.0), 0, 1e-15);
    }

    [Fact]
    public void Rewards_OfBothSigns_AreGainLessLoss()
    {
        double[] rewards = [5, -20];
        var up = Availability(30);
        var expected = Unit.ExpectedReward(Unit.StartAt(0), rewards, [30])[0];
        var sum = Failure + Repair;
        var uptime = (Repair / sum * 30) + (Failure / sum / sum * (1 - Math.Exp(-sum * 30)));
        var total = Unit.TotalReward(Unit.StartAt(0), rewards, [30])[0];

        Assert.InRange(Chains.Distance(expected.Value, (5 * up) - (20 * (1 - up))), 0, 1e-13);
        Assert.InRange(Chains.Distance(total.Value, (5 * uptime) - (20 * (30 - uptime))), 0, 1e-13);
        Assert.InRange(expected.Bound, 0, 1e-12);
    }

    [Fact]
    public void Survival_UntilTheFirstFailure_IsExponential() => Assert.InRange(
        Chains.Distance(Unit.Survival(Unit.StartAt(0), [false, true], [1000])[0].Value, Math.Exp(-1)), 0, 1e-14);

    [Fact]
    public void LongRun_AndStationaryOfAUnit_Agree()
    {
        var vector = Unit.Stationary();
        var limit = Unit.LongRun([0, 1]);

        Assert.Equal(vector.Probabilities, limit.Limit);
        Assert.InRange(Chains.Distance(vector.Probabilities[0], Repair / (Failure + Repair)), 0, 2e-16);
    }

    [Fact]
    public void Stationary_OfAChainWithTransientStates_SaysWhatToAsk()
    {
        var chain = new MarkovChain(Chains.Of(3, (0, 1, 1), (0, 2, 1)));

        Assert.Contains("2 recurrent classes and 1 transient", Assert.Throws<InvalidOperationException>(() => chain.Stationary()).Message, StringComparison.Ordinal);
        Assert.Equal(2, chain.Classes.Recurrent.Count);
    }

    [Fact]
    public void FirstPassage_ToFailure_HasTheMeanOfItsRate()
    {
        var passage = Unit.FirstPassage(Unit.StartAt(0), [false, true], 2);

        Assert.Equal(1000, passage.MeanTime.Value, 1e-12);
        Assert.Equal(1e6, passage.Variance().Value, 1e-9);
    }

    [Fact]
    public void Calls_WithArgumentsThatDoNotFit_NameThem()
    {
        Assert.Throws<ArgumentException>("start", () => Unit.Distribution([1], 1));
        Assert.Throws<ArgumentException>("start", () => Unit.LongRun([0.5, 0.4]));
        Assert.Throws<ArgumentException>("rewards", () => Unit.ExpectedReward([1, 0], [1], [1]));
        Assert.Throws<ArgumentException>("target", () => Unit.FirstPassage([1, 0], [true]));
        Assert.Throws<ArgumentOutOfRangeException>("state", () => Unit.StartAt(2));
        Assert.Throws<ArgumentException>("name", () => Unit.Distribution([1, 0], 1, "magic"));
    }

    [Fact]
    public void Calls_ThatAreCancelled_Stop()
    {
        var context = new SolveContext { Cancellation = new CancellationToken(true) };

        Assert.ThrowsAny<OperationCanceledException>(() => Unit.Distribution([1, 0], 1e6, "uniformization", context));
        Assert.ThrowsAny<OperationCanceledException>(() => Unit.LongRun([1, 0], null, context));
        Assert.ThrowsAny<OperationCanceledException>(() => Unit.FirstPassage([1, 0], [false, true], 1, null, context));
    }
}
