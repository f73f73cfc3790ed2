using ChainSolve.Numerics.Poisson;
using ChainSolve.Numerics.Tests.Support;
using ChainSolve.Numerics.Tests.Transient;
using ChainSolve.Tests.Shared.Reference;

namespace ChainSolve.Numerics.Tests.Poisson;

public class GeometricSumsTests
{
    /// <summary>Against sums over all numbers of steps in 256 bits, by the definition, where the steps lie far before the mean and where they do not.</summary>
    [Theory]
    [InlineData(2000.0, 30, new[] { -1e-3 })]
    [InlineData(2000.0, 1990, new[] { -1e-3 })]
    [InlineData(2000.0, 2100, new[] { 0.0 })]
    [InlineData(2000.0, 5, new[] { -0.3 })]
    [InlineData(2000.0, 40, new[] { -1e-3, 0.0 })]
    [InlineData(2000.0, 40, new[] { -1e-3, -1e-3 })]
    [InlineData(2000.0, 1500, new[] { -1e-3, -2e-3, -1e-9 })]
    [InlineData(1500.0, 20, new[] { -1e-4, -0.9, -0.25 })]
    [InlineData(1500.0, 3, new[] { -1e-12, -1e-14, -1e-10, 1e-31 })]
    [InlineData(0.5, 0, new[] { -0.5, -0.25 })]
    [InlineData(30.0, 12, new[] { -0.5, -0.5, -0.01 })]
    public void After_SomeSteps_IsTheExpectedSum(double mean, long steps, double[] drifts)
    {
        var sums = new GeometricSums(mean, drifts, () => PoissonWindow.Of(mean));
        var found = sums.After(steps);
        var (atTime, upToTime) = Expected(mean, steps - (drifts.Length - 1), drifts);

        Assert.InRange(Chains.Distance(found.AtTime, atTime), 0, found.Error);
        Assert.InRange(Chains.Distance(found.UpToTime, upToTime), 0, found.UpToError);
        Assert.InRange(Math.Max(found.Error, found.UpToError), 0, 3e-16);
        Assert.Equal(found, new GeometricSums(mean, drifts.Reverse(), () => PoissonWindow.Of(mean)).After(steps));
    }

    [Fact]
    public void After_OneStepAfterTheOther_GoesOnAsIfAskedAnew()
    {
        double[] drifts = [-1e-4, -3e-5];
        var sums = new GeometricSums(1e7, drifts, () => PoissonWindow.Of(1e7));
        for (var k = 1000; k < 1050; k++)
        {
            var (one, other) = (sums.After(k), new GeometricSums(1e7, drifts, () => PoissonWindow.Of(1e7)).After(k));
            Assert.InRange(Math.Abs((one.AtTime / other.AtTime) - 1), 0, one.Error + other.Error);
            Assert.InRange(Math.Abs((one.UpToTime / other.UpToTime) - 1), 0, one.UpToError + other.UpToError);
        }
    }

    [Fact]
    public void After_FactorsWithinARange_HoldsBothEnds()
    {
        Drift[] drifts = [new(-2e-3, -1.999e-3), new(-1e-8, 0)];
        var middle = new SettledWeights(1e5, drifts, () => PoissonWindow.Of(1e5)).After(100);
        foreach (var end in new Func<Drift, double>[] { d => d.Low, d => d.High })
        {
            var one = new GeometricSums(1e5, drifts.Select(end), () => PoissonWindow.Of(1e5)).After(100);
            Assert.InRange(one.AtTime, middle.AtTime * (1 - middle.Error), middle.AtTime * (1 + middle.Error));
            Assert.InRange(one.UpToTime, middle.UpToTime * (1 - middle.UpToError), middle.UpToTime * (1 + middle.UpToError));
        }
    }

    /// <summary>The sums from their last term back: s_j(k) = x_j s_j(k + 1) + s_(j-1)(k + 1), and the weights themselves for the first.</summary>
    private static (BigFloat AtTime, BigFloat UpToTime) Expected(double mean, long steps, double[] drifts)
    {
        var last = (int)(mean + (60 * Math.Sqrt(mean)) + 300);
        var weights = new BigFloat[last + 1];
        weights[0] = ClosedForms.Decay(mean);
        for (var k = 1; k <= last; k++)
        {
            weights[k] = weights[k - 1] * (BigFloat)mean / (BigFloat)k;
        }

        double[] all = [.. drifts, 0];
        var sums = Enumerable.Repeat(BigFloat.Zero, all.Length).ToArray();
        for (long k = last; k >= steps; k--)
        {
            for (var j = all.Length - 1; j >= 0; j--)
            {
                sums[j] = (sums[j] * (BigFloat.One + (BigFloat)all[j])) + (j > 0 ? sums[j - 1] : k < 0 ? BigFloat.Zero : weights[k]);
            }
        }

        return (sums[^2], sums[^1]);
    }
}
