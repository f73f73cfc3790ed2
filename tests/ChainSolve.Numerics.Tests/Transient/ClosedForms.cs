using ChainSolve.Tests.Shared.Reference;

namespace ChainSolve.Numerics.Tests.Transient;

/// <summary>Closed forms of textbooks, in 256 bits.</summary>
internal static class ClosedForms
{
    /// <summary>e to the power -x for any x that is not negative; 0 beyond a million.</summary>
    public static BigFloat Decay(BigFloat x)
    {
        if (x > 1e6)
        {
            return BigFloat.Zero;
        }

        var halvings = 0;
        while (x.TimesPowerOfTwo(-halvings) > 1)
        {
            halvings++;
        }

        var value = BigFloat.ExpOfSmall(BigFloat.Zero - x.TimesPowerOfTwo(-halvings));
        for (var k = 0; k < halvings; k++)
        {
            value *= value;
        }

        return value;
    }

    /// <summary>1 - e^-x, by its own series where x is small.</summary>
    public static BigFloat Rise(BigFloat x)
    {
        if (x > 1e-3)
        {
            return BigFloat.One - Decay(x);
        }

        var (sum, term) = (BigFloat.Zero, BigFloat.One);
        for (var k = 1; k < 40; k++)
        {
            term = BigFloat.Zero - (term * x / k);
            sum -= term;
        }

        return sum;
    }

    public static BigFloat Power(BigFloat x, int power) => Enumerable.Range(0, power).Aggregate(BigFloat.One, (p, _) => p * x);

    public static BigFloat Binomial(int n, int k) => Enumerable.Range(1, k).Aggregate(BigFloat.One, (b, i) => b * (n - k + i) / i);

    /// <summary>P(N >= k) for a Poisson number of the given mean, from its upper terms.</summary>
    public static BigFloat PoissonFrom(BigFloat mean, int k)
    {
        var term = Decay(mean);
        var sum = BigFloat.Zero;
        for (var i = 0; i < k + 2000 && !(i > k && term < sum * 1e-60); i++)
        {
            sum += i >= k ? term : BigFloat.Zero;
            term = term * mean / (i + 1);
        }

        return sum;
    }
}
