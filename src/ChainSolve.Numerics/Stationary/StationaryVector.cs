namespace ChainSolve.Numerics.Stationary;

/// <summary>The stationary vector of an irreducible chain.</summary>
public sealed record StationaryVector
{
    /// <summary>One probability a state.</summary>
    public required double[] Probabilities { get; init; }

    /// <summary>A bound on the relative error of every single probability.</summary>
    public required double RelativeBound { get; init; }

    /// <summary>Whether the bound is proved; otherwise it is an estimate that tests support.</summary>
    public required bool IsProved { get; init; }

    /// <summary>How it was computed, for a reader.</summary>
    public required string How { get; init; }
}
