using ChainSolve.Numerics.Estimates;
using ChainSolve.Tests.Shared.Reference;

namespace ChainSolve.Numerics.Tests.Estimates;

public class EstimateTests
{
    [Fact]
    public void Arithmetic_OnRandomIntervals_EnclosesTheTruth()
    {
        var random = new Random(1);
        for (var i = 0; i < 5000; i++)
        {
            var (a, x) = Draw(random);
            var (b, y) = Draw(random);
            var (c, z) = Draw(random);
            Encloses(a + b, x + y);
            Encloses(a - b, x - y);
            Encloses(a * b, x * y);
            Encloses(a / b, x / y);
            Encloses(((a + b) * c / (a + c)) - b, ((x + y) * z / (x + z)) - y);
            Encloses(Estimate.Dot([a, b, c], [0.1, -3, 7]), (x * 0.1) - (y * 3) + (z * 7));
        }
    }

    [Fact]
    public void Arithmetic_OnExactNumbers_IsExactWhereDoublesAre()
    {
        Assert.Equal(new Estimate(3, 0, true), (Estimate)1 + 2);
        Assert.Equal(new Estimate(0.375, 0, true), (Estimate)0.75 * 0.5);
        Assert.Equal(new Estimate(-1.5, 0, true), (Estimate)(-3) / 2);
        Assert.Equal(Estimate.Zero, Estimate.Sum([]));
        Assert.InRange(((Estimate)1 / 3).Bound, 1e-18, 6e-17);
        Assert.Equal(Math.Abs((0.1 + 0.2) - 0.3), ((Estimate)0.1 + 0.2 - 0.3).Value, 1e-17);
    }

    [Fact]
    public void Arithmetic_WithSomethingEstimated_IsEstimated()
    {
        var guess = new Estimate(1, 0.1, false);

        Assert.False((guess + 1).IsProved || (2 * guess).IsProved || (1 / guess).IsProved || (-guess).IsProved);
        Assert.False(Estimate.Sum([1, guess]).IsProved);
    }

    [Fact]
    public void Ratio_ByWhatMayBeZero_HasNoBound()
    {
        Assert.Equal(double.PositiveInfinity, ((Estimate)1 / new Estimate(1e-3, 2e-3, true)).Bound);
        Assert.Equal(double.PositiveInfinity, ((Estimate)1 / 0).Value);
    }

    [Fact]
    public void Infinite_InSumsAndProducts_StaysInfiniteWithoutABound()
    {
        Assert.Equal(Estimate.Infinite, Estimate.Infinite + 1);
        Assert.Equal(Estimate.Infinite, Estimate.Infinite * new Estimate(2, 0.1, true));
        Assert.Equal(Estimate.Zero, 1 / Estimate.Infinite);
    }

    [Fact]
    public void Product_NextToTheSmallestDouble_KeepsItsBound()
    {
        var (small, other) = (1.7e-160, 3.3e-161);
        var product = (Estimate)small * other;

        Encloses(product, (BigFloat)small * other);
        Encloses((Estimate)1e-310 / 3, (BigFloat)1e-310 / 3);
    }

    [Fact]
    public void Dot_OfUnequalLengths_IsRefused() => Assert.Throws<ArgumentException>(() => Estimate.Dot([1, 2], [1]));

    private static (Estimate Estimate, BigFloat Truth) Draw(Random random)
    {
        var value = (random.NextDouble() - 0.5) * Math.Pow(10, random.Next(-8, 8));
        var bound = random.Next(3) == 0 ? 0 : Math.Abs(value) * Math.Pow(10, -random.Next(1, 20));
        return (new Estimate(value, bound, true), (BigFloat)value + ((BigFloat)bound * ((2 * random.NextDouble()) - 1)));
    }

    private static void Encloses(Estimate estimate, BigFloat truth)
    {
        if (double.IsFinite(estimate.Bound))
        {
            Assert.True((estimate.Value - truth).Abs <= estimate.Bound, $"{estimate} does not enclose {truth}.");
        }
    }

    [Fact]
    public void ToString_ValueAndBound_BothShown()
    {
        Assert.Equal("0.25 ± 1.5e-17", new Estimate(0.25, 1.5e-17, true).ToString());
        Assert.Equal("-3 ± 0 (estimated)", new Estimate(-3, 0, false).ToString());
    }
}
