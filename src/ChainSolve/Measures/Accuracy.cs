using ChainSolve.Numerics.Estimates;

namespace ChainSolve.Measures;

/// <summary>The one place where an error bound is held against the accuracy that was asked for.</summary>
internal static class Accuracy
{
    public static SolveStatus Judge(RawPoint point, SolveOptions options)
    {
        var (value, bound) = (point.Value.Value, point.Value.Bound);
        if (double.IsInfinity(value) && point.Reason is not null)
        {
            return SolveStatus.Ok;
        }

        if (!double.IsFinite(value) || !double.IsFinite(bound))
        {
            return SolveStatus.Failed;
        }

        return bound <= options.Tolerance * point.Scale || Math.Abs(value) + bound <= options.Negligible ? SolveStatus.Ok : SolveStatus.Short;
    }
}
