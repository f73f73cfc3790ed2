using ChainSolve.Numerics.Operators;

namespace ChainSolve.Numerics.Absorption;

/// <summary>What is asked of an absorption solver.</summary>
/// <remarks>
/// Every state where <see cref="Alive"/> is true must be left for good with probability one; the caller takes closed
/// classes out of <see cref="Alive"/> first. Immutable by contract: arrays are not written to after they were given.
/// </remarks>
public sealed record AbsorptionProblem
{
    /// <summary>The chain.</summary>
    public required Generator Generator { get; init; }

    /// <summary>The states that count; entering any other ends the time.</summary>
    public required bool[] Alive { get; init; }

    /// <summary>The start distributions for which sojourn times are wanted; entries where <see cref="Alive"/> is false are ignored.</summary>
    public IReadOnlyList<double[]> Starts { get; init; } = [];

    /// <summary>The non-negative rewards whose expected sum until the end is wanted from every state.</summary>
    public IReadOnlyList<double[]> Rewards { get; init; } = [];
}
