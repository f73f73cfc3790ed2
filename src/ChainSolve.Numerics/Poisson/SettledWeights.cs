using ChainSolve.Numerics.Arithmetic;

namespace ChainSolve.Numerics.Poisson;

/// <summary><see cref="GeometricSums"/> where each factor is known to lie between two: from both ends. Not safe to share between threads.</summary>
internal sealed class SettledWeights(DoubleDouble mean, IReadOnlyList<Drift> drifts, Func<PoissonWindow> window)
{
    private readonly GeometricSums low = new(mean, drifts.Select(d => d.Low), window);
    private readonly GeometricSums high = new(mean, drifts.Select(d => d.High), window);

    /// <summary>The weights after k steps; their errors take in how far the factors may be off.</summary>
    public SettledWeight After(long k)
    {
        var (least, most) = (low.After(k), high.After(k));
        var (atTime, off) = Middle(least.AtTime, most.AtTime);
        var (upToTime, offUpTo) = Middle(least.UpToTime, most.UpToTime);
        var error = Math.Max(least.Error, most.Error) + 1.2e-16;
        return new SettledWeight(atTime, upToTime, error + off, error + offUpTo);
    }

    private static (double Middle, double Off) Middle(double low, double high)
    {
        var middle = low + ((high - low) / 2);
        return (middle, middle == 0 ? 0 : Math.Abs(high - low) / 2 / middle);
    }
}
