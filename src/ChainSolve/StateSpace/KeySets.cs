using System.Numerics;

namespace ChainSolve.StateSpace;

/// <summary>Chooses a set for the keys of a model.</summary>
internal static class KeySets
{
    // A map of 32 MiB at most.
    private const int ShortKey = 28;

    public static KeySet<TKey> For<TKey>(StateLayout layout, int shards, CancellationToken cancellation)
        where TKey : unmanaged, IBinaryInteger<TKey> =>
        layout.Bits <= ShortKey && new KeyBitmap(layout.Bits, shards) is KeySet<TKey> map ? map : new KeyBlocks<TKey>(shards, cancellation);
}
