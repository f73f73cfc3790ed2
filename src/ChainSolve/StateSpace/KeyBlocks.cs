using System.Numerics;

namespace ChainSolve.StateSpace;

/// <summary>
/// Keys of any width in blocks of 64 neighbours: a hash from the upper bits to a word with a bit for each key. Costs 45 to 80 bytes a block, so
/// the fewer for each key, the denser they stand.
/// </summary>
internal sealed class KeyBlocks<TKey> : KeySet<TKey>
    where TKey : unmanaged, IBinaryInteger<TKey>
{
    private const int BlocksBetweenLooks = 1 << 18;

    // The slots of so many keys are touched before any of them is looked at, so that memory is waited for once and not for each.
    private const int KeysAtOnce = 128;

    // Four blocks fill a line of a cache.
    private const int NeighbourBits = 2;

    // A wide key is aligned to its size, so that its block takes twice that too.
    private static readonly long KeyBytes = typeof(TKey) == typeof(ulong) ? 8 : 16;

    private readonly Shard[] shards;
    private TKey[] order = [];
    private int[] before = [];

    /// <param name="shards">The number of shards.</param>
    /// <param name="cancellation">Stops the set amid growing.</param>
    public KeyBlocks(int shards, CancellationToken cancellation)
        : base(shards) => this.shards = [.. Enumerable.Range(0, shards).Select(_ => new Shard(cancellation))];

    public override long Bytes => shards.Sum(s => s.Bytes) + (order.LongLength * (KeyBytes + 4L));

    public override int Add(int shard, ReadOnlySpan<TKey> keys, Span<TKey> added) => shards[shard].Add(keys, added);

    public override void Close(CancellationToken cancellation)
    {
        order = new TKey[shards.Sum(s => s.Count)];
        var count = 0;
        foreach (var shard in shards)
        {
            count += shard.CopyBlocks(order.AsSpan(count));
            shard.Close();
        }

        KeySort.Sort(order, cancellation);
        before = new int[order.Length];
        var keys = 0;
        for (var b = 0; b < order.Length; b++)
        {
            if (b % BlocksBetweenLooks == 0)
            {
                cancellation.ThrowIfCancellationRequested();
            }

            before[b] = keys;
            keys += BitOperations.PopCount(ShardWith(order[b]).Number(order[b], keys));
        }
    }

    public override void Find(ReadOnlySpan<TKey> keys, Span<int> numbers)
    {
        for (var first = 0; first < keys.Length; first += KeysAtOnce)
        {
            var run = keys.Slice(first, Math.Min(KeysAtOnce, keys.Length - first));
            foreach (var key in run)
            {
                ShardWith(key >> 6).Touch(key);
            }

            for (var i = 0; i < run.Length; i++)
            {
                numbers[first + i] = ShardWith(run[i] >> 6).Find(run[i]);
            }
        }
    }

    public override void CopyKeys(int first, Span<TKey> keys)
    {
        var at = KeyRuns.LastAtMost(before, first);
        for (var (b, count, skip) = (at, 0, first - before[at]); count < keys.Length; b++)
        {
            KeyRuns.Copy(order[b] << 6, ShardWith(order[b]).WordOf(order[b]), ref skip, keys, ref count);
        }
    }

    private Shard ShardWith(TKey block) => shards.Length == 1 ? shards[0] : shards[ShardOf(block << 6)];

    private struct Block
    {
        public TKey Number;

        // One bit at least in a block that is there.
        public ulong Word;
    }

    /// <summary>Blocks with open addressing and linear probing.</summary>
    private sealed class Shard(CancellationToken cancellation)
    {
        private Block[] blocks = new Block[64];
        private int[] before = [];
        private int shift = 64 - 6;

        // Nobody asks for it; without it, touching would be left out.
        private ulong touched;

        public int Count { get; private set; }

        public long Bytes => (blocks.LongLength * 2 * KeyBytes) + (4L * before.LongLength);

        public int Add(ReadOnlySpan<TKey> keys, Span<TKey> added)
        {
            // Room for all of them, so that slots do not move meanwhile.
            while ((Count + (long)keys.Length) * 5 > blocks.LongLength * 3)
            {
                Grow();
            }

            var count = 0;
            for (var first = 0; first < keys.Length; first += KeysAtOnce)
            {
                var run = keys.Slice(first, Math.Min(KeysAtOnce, keys.Length - first));
                foreach (var key in run)
                {
                    Touch(key);
                }

                foreach (var key in run)
                {
                    added[count] = key;
                    count += Add(key);
                }
            }

            return count;
        }

        /// <summary>Asks memory for where a key is looked for first, without waiting for it.</summary>
        public void Touch(TKey key)
        {
            var slot = HomeOf(key >> 6);
            touched ^= blocks[slot].Word;
            if (before.Length > 0)
            {
                touched ^= (uint)before[slot];
            }
        }

        private int Add(TKey key)
        {
            ref var block = ref blocks[SlotOf(blocks, key >> 6)];
            if (block.Word == 0)
            {
                block.Number = key >> 6;
                Count++;
            }

            var bit = (int)(uint.CreateTruncating(key) & 63);
            var isNew = 1 - (int)((block.Word >> bit) & 1);
            block.Word |= 1UL << bit;
            return isNew;
        }

        public int CopyBlocks(Span<TKey> numbers)
        {
            var count = 0;
            for (var slot = 0; slot < blocks.Length; slot++)
            {
                if (slot % BlocksBetweenLooks == 0)
                {
                    cancellation.ThrowIfCancellationRequested();
                }

                if (blocks[slot].Word != 0)
                {
                    numbers[count++] = blocks[slot].Number;
                }
            }

            return count;
        }

        /// <summary>Makes room for the numbers of keys.</summary>
        public void Close() => before = GC.AllocateUninitializedArray<int>(blocks.Length);

        /// <summary>Tells a block how many keys stand before it; gives its word.</summary>
        public ulong Number(TKey block, int keysBefore)
        {
            var slot = SlotOf(blocks, block);
            before[slot] = keysBefore;
            return blocks[slot].Word;
        }

        public ulong WordOf(TKey block) => blocks[SlotOf(blocks, block)].Word;

        public int Find(TKey key)
        {
            var slot = SlotOf(blocks, key >> 6);
            var word = blocks[slot].Word;
            var bit = 1UL << (int)(uint.CreateTruncating(key) & 63);
            return (word & bit) == 0 ? -1 : before[slot] + BitOperations.PopCount(word & (bit - 1));
        }

        private void Grow()
        {
            shift--;
            var grown = new Block[2L * blocks.LongLength];
            for (var slot = 0; slot < blocks.Length; slot++)
            {
                if (slot % BlocksBetweenLooks == 0)
                {
                    cancellation.ThrowIfCancellationRequested();
                }

                if (blocks[slot].Word != 0)
                {
                    grown[SlotOf(grown, blocks[slot].Number)] = blocks[slot];
                }
            }

            blocks = grown;
        }

        // Neighbours stand side by side, so that what is read for one of them serves the others.
        private int HomeOf(TKey block) =>
            ((int)(KeyHash.Of(block >> NeighbourBits) >> shift) & -(1 << NeighbourBits)) | ((int)uint.CreateTruncating(block) & ((1 << NeighbourBits) - 1));

        private int SlotOf(Block[] table, TKey block)
        {
            var slot = HomeOf(block);
            while (table[slot].Word != 0 && table[slot].Number != block)
            {
                slot = (slot + 1) & (table.Length - 1);
            }

            return slot;
        }
    }
}
