using ChainSolve.Numerics.Timeline;

namespace ChainSolve.Numerics.Tests.Timeline;

public class JumpTests
{
    // A test that finds a hidden fault with 0.9 and puts it under repair: up, hidden, under repair.
    private static readonly Jump Test = Jump.Of(3, 3, [(0, 0, 1), (1, 2, 0.9), (1, 1, 0.05), (1, 1, 0.05), (2, 2, 1)]);

    [Fact]
    public void Forward_ADistribution_MovesItsMass() => Assert.Equal([0.25, 0.05, 0.7], Test.Forward([0.25, 0.5, 0.25]), (a, b) => Math.Abs(a - b) < 1e-16);

    [Fact]
    public void Backward_Values_TakesTheirMean() => Assert.Equal([10.0, 2 + 27, 30], Test.Backward([10, 20, 30]), (a, b) => Math.Abs(a - b) < 1e-14);

    [Fact]
    public void ForwardAndBackward_OfTheSamePair_AreAdjoint()
    {
        double[] p = [0.2, 0.3, 0.5];
        double[] v = [3, 1, 7];

        Assert.Equal(Test.Forward(p).Zip(v, (a, b) => a * b).Sum(), Test.Backward(v).Zip(p, (a, b) => a * b).Sum(), 1e-15);
    }

    [Fact]
    public void Chance_OfAPair_IsTheSumOfWhatWasGiven()
    {
        Assert.Equal(0.1, Test.Chance(1, 1));
        Assert.Equal(0, Test.Chance(0, 2));
    }

    [Fact]
    public void Map_ToAnotherChain_MovesEveryState()
    {
        var jump = Jump.Map([1, 1, 0], 2);

        Assert.Equal((3, 2), (jump.SourceCount, jump.TargetCount));
        Assert.Equal([0.5, 0.5], jump.Forward([0.25, 0.25, 0.5]));
        Assert.Equal([8, 8, 7], jump.Backward([7, 8]));
    }

    [Fact]
    public void Of_ChancesThatDoNotFit_SaysWhere()
    {
        Assert.Contains("state 1 add to 0.5", Fault(() => Jump.Of(2, 2, [(0, 0, 1), (1, 0, 0.5)])), StringComparison.Ordinal);
        Assert.Contains("from 0 to 2", Fault(() => Jump.Of(2, 2, [(0, 2, 1)])), StringComparison.Ordinal);
        Assert.Contains("is -0.5", Fault(() => Jump.Of(1, 2, [(0, 0, 1.5e-10), (0, 1, -0.5)])), StringComparison.Ordinal);
        Assert.Contains("is NaN", Fault(() => Jump.Of(1, 1, [(0, 0, double.NaN)])), StringComparison.Ordinal);
        Assert.Throws<ArgumentException>("before", () => Test.Forward([1]));
        Assert.Throws<ArgumentException>("after", () => Test.Backward([1]));
    }

    private static string Fault(Action action) => Assert.Throws<ArgumentException>(action).Message;
}
