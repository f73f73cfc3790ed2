using System.Numerics;

namespace ChainSolve.StateSpace;

/// <summary>Chooses a set for the keys of a model.</summary>
internal static class KeySets
{
    // A map of 32 MiB at most.
    private const int ShortKey = 28;

    /// <summary>Whether keys are so short that a map of bits holds them.</summary>
    public static bool IsShort(StateLayout layout) => layout.Bits <= ShortKey;

    public static KeySet<TKey> For<TKey>(StateLayout layout, int shards, CancellationToken cancellation)
        where TKey : unmanaged, IBinaryInteger<TKey> =>
        IsShort(layout) && new KeyBitmap(layout.Bits, shards) is KeySet<TKey> map ? map : new KeyBlocks<TKey>(shards, cancellation);
}
