using System.Numerics;

namespace ChainSolve.StateSpace;

/// <summary>Short keys as bits of one map: a bit for each key that is possible, and a count for each 64 of them.</summary>
internal sealed class KeyBitmap : KeySet<ulong>
{
    private const int WordsBetweenLooks = 1 << 20;

    private readonly ulong[] words;
    private int[] before = [];

    /// <param name="bits">The width of a key, at most 36.</param>
    /// <param name="shards">The number of shards.</param>
    public KeyBitmap(int bits, int shards)
        : base(shards) => words = new ulong[1L << Math.Max(0, bits - 6)];

    public override long Bytes => (8L * words.LongLength) + (4L * before.LongLength);

    public override int Add(int shard, ReadOnlySpan<ulong> keys, Span<ulong> added)
    {
        var count = 0;
        foreach (var key in keys)
        {
            // Whether a key is there is hard to foresee: no branch.
            ref var word = ref words[key >> 6];
            added[count] = key;
            count += 1 - (int)((word >> (int)key) & 1);
            word |= 1UL << (int)key;
        }

        return count;
    }

    public override void Close(CancellationToken cancellation)
    {
        before = GC.AllocateUninitializedArray<int>(words.Length);
        var count = 0;
        for (var w = 0; w < words.Length; w++)
        {
            if (w % WordsBetweenLooks == 0)
            {
                cancellation.ThrowIfCancellationRequested();
            }

            before[w] = count;
            count += BitOperations.PopCount(words[w]);
        }
    }

    public override void Find(ReadOnlySpan<ulong> keys, Span<int> numbers)
    {
        for (var i = 0; i < keys.Length; i++)
        {
            var key = keys[i];
            var word = words[key >> 6];
            var bit = 1UL << (int)key;
            numbers[i] = (word & bit) == 0 ? -1 : before[key >> 6] + BitOperations.PopCount(word & (bit - 1));
        }
    }

    public override void CopyKeys(int first, Span<ulong> keys)
    {
        // The last word with at most this many keys before it holds the key, or empty words stand before that one.
        var at = KeyRuns.LastAtMost(before, first);
        for (var (w, count, skip) = (at, 0, first - before[at]); count < keys.Length; w++)
        {
            KeyRuns.Copy((ulong)w << 6, words[w], ref skip, keys, ref count);
        }
    }
}
