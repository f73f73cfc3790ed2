using ChainSolve.Numerics.Estimates;

namespace ChainSolve.Numerics.Stationary;

/// <summary>A recurrent class in which a chain may end, and what it does there.</summary>
/// <remarks>Immutable by contract; safe to share between threads.</remarks>
public sealed record RecurrentClass
{
    /// <summary>The states of the class, ascending.</summary>
    public required int[] States { get; init; }

    /// <summary>The probability of ending in this class.</summary>
    public required Estimate Chance { get; init; }

    /// <summary>The stationary vector within the class: one probability for each of <see cref="States"/>.</summary>
    public required double[] Probabilities { get; init; }

    /// <summary>A bound on the relative error of every one of <see cref="Probabilities"/>.</summary>
    public required double RelativeBound { get; init; }

    /// <summary>Whether <see cref="RelativeBound"/> is proved.</summary>
    public required bool IsProved { get; init; }
}
