namespace ChainSolve.Numerics.Absorption;

/// <summary>What an absorption solver found, in the order in which it was asked.</summary>
public sealed record AbsorptionResult
{
    /// <summary>Expected time spent in each state, by start and then by state; 0 where a state does not count.</summary>
    public required double[][] Sojourns { get; init; }

    /// <summary>Expected reward until the end, by reward and then by the state it starts from; 0 where a state does not count.</summary>
    public required double[][] Earnings { get; init; }

    /// <summary>A bound on the relative error of every single entry.</summary>
    public required double RelativeBound { get; init; }

    /// <summary>Whether the bound is proved; otherwise it is an estimate that tests support.</summary>
    public required bool IsProved { get; init; }

    /// <summary>How it was computed, for a reader.</summary>
    public required string How { get; init; }
}
