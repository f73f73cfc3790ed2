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
}
