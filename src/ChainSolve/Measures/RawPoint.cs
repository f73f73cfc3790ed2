using ChainSolve.Numerics.Estimates;

namespace ChainSolve.Measures;

/// <summary>A value of a measure before its accuracy is judged.</summary>
/// <param name="Time">Its time; null for a value without one.</param>
/// <param name="Value">The value.</param>
/// <param name="Scale">What its accuracy is measured against: the value itself, or for a reward of both signs the sum of both parts.</param>
/// <param name="Reason">Why it is infinite; null for a finite one.</param>
internal sealed record RawPoint(double? Time, Estimate Value, double Scale, string? Reason = null)
{
    /// <summary>A value without a time that is judged against itself.</summary>
    public static RawPoint Of(Estimate value, string? reason = null) => new(null, value, Math.Abs(value.Value), reason);
}
