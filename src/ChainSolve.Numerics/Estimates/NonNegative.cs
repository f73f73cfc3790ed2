using ChainSolve.Numerics.Arithmetic;

namespace ChainSolve.Numerics.Estimates;

/// <summary>Estimates from sums of non-negative terms whose relative error is known.</summary>
internal static class NonNegative
{
    // Below it the second half of a product is not representable any more.
    private const double Smallest = 1e-290;

    /// <summary>A value with a relative bound, and with what a subnormal may be off.</summary>
    public static Estimate Relative(double value, double relativeBound, bool isProved) => value == 0
        ? Estimate.Zero
        : new Estimate(value, Math.BitIncrement(value * relativeBound) + double.Epsilon, isProved);

    /// <summary>The sum of products of two vectors, of which the first has entries with a relative bound and the second is exact.</summary>
    public static Estimate Dot(double[] values, double[] weights, double relativeBound, bool isProved)
    {
        LongSum sum = default;
        var lost = 0.0;
        for (var i = 0; i < values.Length; i++)
        {
            if (values[i] == 0 || weights[i] == 0)
            {
                continue;
            }

            sum.AddProduct(values[i], weights[i]);
            if (values[i] < Smallest || values[i] * weights[i] < Smallest)
            {
                // The relative bound does not reach numbers so small: they may be off by a few smallest doubles.
                lost += 4 * double.Epsilon * Math.Max(1, weights[i]);
            }
        }

        if (sum.Value == 0 && lost == 0)
        {
            return Estimate.Zero;
        }

        var relative = relativeBound + LongSum.Rounding;
        return new Estimate(sum.Value, (sum.Value * relative) + lost, isProved);
    }
}
