using ChainSolve.Numerics.Absorption;
using ChainSolve.Numerics.Stationary;

namespace ChainSolve.Numerics.Iteration;

/// <summary>Which methods are to be used for long-run and first-passage values. Immutable; safe to share between threads.</summary>
public sealed record SolverOptions
{
    /// <summary>Every method is chosen from the structure and size of the chain.</summary>
    public static SolverOptions Default { get; } = new();

    /// <summary>The name of the stationary method; null to choose.</summary>
    public string? Stationary { get; init; }

    /// <summary>The name of the absorption method; null to choose.</summary>
    public string? Absorption { get; init; }

    /// <summary>The stationary methods to choose from, those of the caller among them; null for all of this library.</summary>
    public IReadOnlyList<IStationarySolver>? StationarySolvers { get; init; }

    /// <summary>The absorption methods to choose from, those of the caller among them; null for all of this library.</summary>
    public IReadOnlyList<IAbsorptionSolver>? AbsorptionSolvers { get; init; }
}
