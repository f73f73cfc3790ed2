using ChainSolve.Numerics.Estimates;

namespace ChainSolve.Numerics.Transient;

/// <summary>What a transient solver found, in the order in which it was asked.</summary>
public sealed record TransientResult
{
    /// <summary>p(t)·r, by time and then by reward.</summary>
    public required Estimate[][] Rates { get; init; }

    /// <summary>∫₀ᵗ p(s)·r ds, by time and then by reward.</summary>
    public required Estimate[][] Totals { get; init; }

    /// <summary>p(t) by time and then by state; null where it was not wanted.</summary>
    public required double[][]? Distributions { get; init; }

    /// <summary>A bound on the error of each entry of <see cref="Distributions"/>; null where they were not wanted.</summary>
    public required double[][]? DistributionBounds { get; init; }

    /// <summary>How it was computed, for a reader: figures such as steps and q·t.</summary>
    public required string How { get; init; }
}
