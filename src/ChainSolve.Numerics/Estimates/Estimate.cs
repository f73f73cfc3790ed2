using ChainSolve.Numerics.Arithmetic;

namespace ChainSolve.Numerics.Estimates;

/// <summary>A number with an absolute bound on its error.</summary>
/// <remarks>
/// The true value lies in <c>[Value - Bound, Value + Bound]</c>. A value that is zero by structure is exactly 0 with
/// bound 0. An infinite value has bound 0. Arithmetic carries the bounds through, its own rounding included.
/// </remarks>
/// <param name="Value">The number.</param>
/// <param name="Bound">The absolute error bound; not negative.</param>
/// <param name="IsProved">
/// Whether the bound follows from an error analysis without a gap; otherwise it is an estimate that tests support.
/// </param>
public readonly record struct Estimate(double Value, double Bound, bool IsProved)
{
    /// <summary>A value that is zero by structure.</summary>
    public static Estimate Zero => new(0, 0, true);

    /// <summary>A value known up to the rounding of a double.</summary>
    public static Estimate Exact(double value) => new(value, 0, true);

    /// <summary>An infinite value.</summary>
    public static Estimate Infinite => new(double.PositiveInfinity, 0, true);

    /// <summary>The estimate of an exact number.</summary>
    public static implicit operator Estimate(double value) => Exact(value);

    /// <summary>The number and its bound, such as <c>0.25 ± 1.1e-17</c>, the same in every culture.</summary>
    public override string ToString() => FormattableString.Invariant($"{Value:R} ± {Bound:g2}{(IsProved ? "" : " (estimated)")}");

    /// <summary>The sum.</summary>
    public static Estimate operator +(Estimate a, Estimate b)
    {
        var sum = DoubleDouble.Sum(a.Value, b.Value);
        return Rounded(a.Value + b.Value, sum.Low, a.Bound + b.Bound, a.IsProved && b.IsProved);
    }

    /// <summary>The difference. Where the two are close the bound stays, so that it is large beside the value.</summary>
    public static Estimate operator -(Estimate a, Estimate b) => a + -b;

    /// <summary>The negative.</summary>
    public static Estimate operator -(Estimate a) => a with { Value = -a.Value };

    /// <summary>The product.</summary>
    public static Estimate operator *(Estimate a, Estimate b)
    {
        var product = a.Value * b.Value;
        return Rounded(
            product,
            Math.FusedMultiplyAdd(a.Value, b.Value, -product),
            Times(Math.Abs(a.Value), b.Bound) + Times(Math.Abs(b.Value), a.Bound) + Times(a.Bound, b.Bound),
            a.IsProved && b.IsProved,
            Math.Abs(product) < Smallest && a.Value != 0 && b.Value != 0);
    }

    /// <summary>The ratio. Where the divisor may be zero, the bound is infinite.</summary>
    public static Estimate operator /(Estimate a, Estimate b)
    {
        var ratio = a.Value / b.Value;
        var divisor = Math.Abs(b.Value) - b.Bound;
        var proved = a.IsProved && b.IsProved;
        if (!double.IsFinite(ratio) || double.IsInfinity(b.Value))
        {
            return new Estimate(ratio, 0, proved);
        }

        if (divisor <= 0)
        {
            return new Estimate(ratio, double.PositiveInfinity, proved);
        }

        // The remainder of the rounded quotient is exact, and so tells its error.
        var remainder = Math.Abs(Math.FusedMultiplyAdd(-ratio, b.Value, a.Value));
        return Rounded(
            ratio,
            0,
            (a.Bound + Times(Math.Abs(ratio), b.Bound) + remainder) / divisor,
            proved,
            a.Value != 0 && (Math.Abs(a.Value) < Smallest || Math.Abs(ratio) < Smallest));
    }

    /// <summary>The sum of several estimates, added in their order.</summary>
    public static Estimate Sum(IEnumerable<Estimate> terms)
    {
        ArgumentNullException.ThrowIfNull(terms);
        return terms.Aggregate(Zero, (sum, term) => sum + term);
    }

    /// <summary>The sum of several estimates, each times an exact number.</summary>
    /// <exception cref="ArgumentException">There are more of the one than of the other.</exception>
    public static Estimate Dot(IReadOnlyList<Estimate> terms, IReadOnlyList<double> weights)
    {
        ArgumentNullException.ThrowIfNull(terms);
        ArgumentNullException.ThrowIfNull(weights);
        if (terms.Count != weights.Count)
        {
            throw new ArgumentException($"There are {terms.Count} terms and {weights.Count} weights.", nameof(weights));
        }

        return Sum(terms.Select((term, i) => term * weights[i]));
    }

    // Below it the error of a product is no longer a double.
    private const double Smallest = 1e-290;

    /// <summary>A product of bounds, of which a zero wins over an infinity.</summary>
    private static double Times(double value, double bound) => value == 0 || bound == 0 ? 0 : value * bound;

    private static Estimate Rounded(double value, double rounding, double bound, bool proved, bool isSubnormal = false)
    {
        if (!double.IsFinite(value))
        {
            return new Estimate(value, 0, proved);
        }

        var total = bound + Math.Abs(rounding);
        if (total == 0 && !isSubnormal)
        {
            return new Estimate(value, 0, proved);
        }

        // The bound itself took a handful of roundings.
        return new Estimate(value, Math.BitIncrement(total * (1 + 2e-15)) + (isSubnormal ? 4 * double.Epsilon : 0), proved);
    }
}
