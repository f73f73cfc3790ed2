using System.Numerics;

namespace ChainSolve.StateSpace;

/// <summary>Gives the keys of successors. Immutable; safe to share between threads.</summary>
internal sealed class SuccessorKeys<TKey>(KeyCodec<TKey> codec, IReadOnlyList<EffectPlan> plans)
    where TKey : unmanaged, IBinaryInteger<TKey>
{
    private readonly TKey[] shifts = [.. plans.Select(codec.ShiftOf)];

    /// <summary>Packs and unpacks markings.</summary>
    public KeyCodec<TKey> Codec { get; } = codec;

    /// <summary>The key of a successor.</summary>
    /// <param name="from">The key of the state.</param>
    /// <param name="successors">Its successors.</param>
    /// <param name="successor">Which of them.</param>
    public TKey Of(TKey from, SuccessorList successors, int successor) => successors.IsShift(successor)
        ? unchecked(from + shifts[successors.Transition(successor)])
        : Codec.Pack(successors.Marking(successor));
}
