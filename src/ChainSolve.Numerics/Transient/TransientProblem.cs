using ChainSolve.Numerics.Operators;

namespace ChainSolve.Numerics.Transient;

/// <summary>
/// What is asked of a transient solver: for a chain that starts with the distribution p0, and with p(t) = p0 exp(Qt),
/// the values p(t)·r and the totals ∫₀ᵗ p(s)·r ds of some rewards r at some times.
/// </summary>
/// <remarks>Immutable by contract: arrays are not written to after they were given.</remarks>
public sealed record TransientProblem
{
    /// <summary>The chain.</summary>
    public required Generator Generator { get; init; }

    /// <summary>The start distribution p0: one probability a state. With <see cref="Alive"/> the mass elsewhere is ignored.</summary>
    public required double[] Start { get; init; }

    /// <summary>
    /// The states that count; null for all. Where it is false, a state is taken out of the chain: what enters it is
    /// lost, so that p(t)·1 is the probability of never having left the states that are true.
    /// </summary>
    public bool[]? Alive { get; init; }

    /// <summary>The times, in any order, none negative, in the unit of the rates.</summary>
    public required IReadOnlyList<double> Times { get; init; }

    /// <summary>Rewards of which p(t)·r is wanted at every time; one non-negative entry a state.</summary>
    public IReadOnlyList<double[]> Rates { get; init; } = [];

    /// <summary>Rewards of which ∫₀ᵗ p(s)·r ds is wanted at every time; one non-negative entry a state.</summary>
    public IReadOnlyList<double[]> Totals { get; init; } = [];

    /// <summary>Whether the whole distribution p(t) is wanted at every time.</summary>
    public bool WantsDistributions { get; init; }
}
