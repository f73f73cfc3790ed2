using System.Numerics;

namespace ChainSolve.StateSpace;

/// <summary>
/// A set of keys that is filled first, then closed, and from then on numbers its keys by their order. Its keys belong to shards; threads may
/// add at once if each adds to a shard of its own. Once closed, it is safe to share between threads.
/// </summary>
internal abstract class KeySet<TKey>(int shards)
    where TKey : unmanaged, IBinaryInteger<TKey>
{
    // Keys of one group of this many bits belong to one shard, so that no two shards write to one line of a cache.
    private const int GroupBits = 9;

    /// <summary>The number of shards.</summary>
    public int Shards { get; } = shards;

    /// <summary>About how many bytes the set takes.</summary>
    public abstract long Bytes { get; }

    /// <summary>The shard of a key.</summary>
    public int ShardOf(TKey key) => (int)((KeyHash.Of(key >> GroupBits) >> 32) * (uint)Shards >> 32);

    /// <summary>Adds keys of one shard; one that is there already is passed over.</summary>
    /// <param name="shard">The shard.</param>
    /// <param name="keys">The keys.</param>
    /// <param name="added">Takes those that were not there; at least as long as the keys.</param>
    /// <returns>How many were not there.</returns>
    public abstract int Add(int shard, ReadOnlySpan<TKey> keys, Span<TKey> added);

    /// <summary>Numbers the keys. Nothing is added from then on.</summary>
    public abstract void Close(CancellationToken cancellation);

    /// <summary>The numbers of keys; -1 for those that are not there.</summary>
    public abstract void Find(ReadOnlySpan<TKey> keys, Span<int> numbers);

    /// <summary>Writes the keys of consecutive numbers.</summary>
    /// <param name="first">The first number.</param>
    /// <param name="keys">Takes the keys, as many as it has room for.</param>
    public abstract void CopyKeys(int first, Span<TKey> keys);
}
