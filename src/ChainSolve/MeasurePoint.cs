using ChainSolve.Numerics.Estimates;

namespace ChainSolve;

/// <summary>A value of a measure. Immutable; safe to share between threads.</summary>
public sealed record MeasurePoint
{
    /// <summary>The time that the value belongs to, in the model's unit of time; null for a value without one.</summary>
    public required double? Time { get; init; }

    /// <summary>The value, in <see cref="MeasureResult.Unit"/>; infinite where it is so, with a <see cref="Reason"/>.</summary>
    public required double Value { get; init; }

    /// <summary>An absolute bound on the error of the calculation: the exact value for the model as written is no farther away.</summary>
    public required double ErrorBound { get; init; }

    /// <summary>Whether the bound follows from an error analysis without a gap; otherwise it is an estimate that tests support.</summary>
    public required bool IsProved { get; init; }

    /// <summary><see cref="SolveStatus.Ok"/>, or <see cref="SolveStatus.Short"/> where the bound is wider than was asked.</summary>
    public required SolveStatus Status { get; init; }

    /// <summary>Why the value is infinite; null for a finite one.</summary>
    public string? Reason { get; init; }
}
