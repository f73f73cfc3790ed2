using System.Numerics;
using ChainSolve.StateSpace;
using FsCheck.Xunit;

namespace ChainSolve.Tests.StateSpace;

/// <summary>The sets of keys against a plain set that is sorted.</summary>
public class KeySetTests
{
    [Property(MaxTest = 100)]
    public void Bitmap_AnyKeys_NumbersThemInOrder(int seed)
    {
        var random = new Random(seed);
        var bits = random.Next(0, 20);
        var shards = random.Next(1, 4);
        NumbersThemInOrder(random, new KeyBitmap(bits, shards), Keys(random, bits, 0).Select(k => (ulong)k));
    }

    [Property(MaxTest = 100)]
    public void Blocks_AnyKeys_NumbersThemInOrder(int seed)
    {
        var random = new Random(seed);
        var shards = random.Next(1, 4);
        NumbersThemInOrder(random, new KeyBlocks<ulong>(shards, default), Keys(random, random.Next(0, 65), random.Next(60)).Select(k => (ulong)k));
    }

    [Property(MaxTest = 100)]
    public void Blocks_WideKeys_NumbersThemInOrder(int seed)
    {
        var random = new Random(seed);
        var shards = random.Next(1, 4);
        NumbersThemInOrder(random, new KeyBlocks<UInt128>(shards, default), Keys(random, random.Next(0, 129), random.Next(120)));
    }

    [Fact]
    public void Blocks_KeysAtTheEnds_AreKept()
    {
        var set = new KeyBlocks<UInt128>(1, default);
        var added = new UInt128[4];
        Assert.Equal(3, set.Add(0, [UInt128.MaxValue, 0, UInt128.MaxValue, ulong.MaxValue], added));
        set.Close(CancellationToken.None);
        var numbers = new int[5];
        set.Find([0, ulong.MaxValue, UInt128.MaxValue, 1, UInt128.MaxValue - 1], numbers);
        Assert.Equal([0, 1, 2, -1, -1], numbers);
    }

    [Property(MaxTest = 100)]
    public void Table_AnyKeys_HoldsEachOnceAsTheyCome(int seed)
    {
        var random = new Random(seed);
        var table = new KeyTable<ulong>();
        var seen = new HashSet<ulong>();
        var inOrder = new List<ulong>();
        foreach (var key in Keys(random, 64, random.Next(60)).Select(k => (ulong)k))
        {
            Assert.Equal(seen.Add(key), table.Add(key));
            if (inOrder.Count < seen.Count)
            {
                inOrder.Add(key);
            }
        }

        Assert.Equal(inOrder, Enumerable.Range(0, table.Count).Select(i => table[i]));
    }

    [Fact]
    public void Sort_MoreKeysThanAreSortedInOneGo_SortsThem()
    {
        var random = new Random(7);
        UInt128[] keys = [.. Enumerable.Range(0, 1_200_000).Select(i => (UInt128)random.NextInt64() << random.Next(0, 60))];
        var expected = (UInt128[])keys.Clone();
        Array.Sort(expected);
        KeySort.Sort(keys.AsSpan(), CancellationToken.None);
        Assert.Equal(expected, keys);
    }

    [Fact]
    public void Sort_Cancelled_Stops()
    {
        using var source = new CancellationTokenSource();
        source.Cancel();
        Assert.Throws<OperationCanceledException>(() => KeySort.Sort(new ulong[3].AsSpan(), source.Token));
    }

    // Some close together, some far apart, many of them twice.
    private static List<UInt128> Keys(Random random, int bits, int spread)
    {
        var mask = bits == 128 ? UInt128.MaxValue : (UInt128.One << bits) - 1;
        return [.. Enumerable.Range(0, random.Next(1, 600)).Select(_ => ((UInt128)random.Next(300) << random.Next(spread + 1)) & mask)];
    }

    private static void NumbersThemInOrder<TKey>(Random random, KeySet<TKey> set, IEnumerable<TKey> keys)
        where TKey : unmanaged, IBinaryInteger<TKey>
    {
        var expected = new HashSet<TKey>();
        foreach (var run in keys.Chunk(random.Next(1, 20)))
        {
            foreach (var ofShard in run.GroupBy(set.ShardOf))
            {
                var added = new TKey[ofShard.Count()];
                var count = set.Add(ofShard.Key, [.. ofShard], added);
                Assert.Equal(ofShard.Where(expected.Add).ToList(), added.Take(count));
            }
        }

        set.Close(CancellationToken.None);
        TKey[] sorted = [.. expected.Order()];
        var numbers = new int[sorted.Length];
        set.Find(sorted, numbers);
        Assert.Equal(Enumerable.Range(0, sorted.Length), numbers);

        var first = random.Next(sorted.Length);
        var read = new TKey[sorted.Length - first];
        set.CopyKeys(first, read);
        Assert.Equal(sorted[first..], read);

        foreach (var other in sorted.Select(k => k ^ TKey.One).Where(k => !expected.Contains(k) && k < sorted[^1]))
        {
            set.Find([other], numbers);
            Assert.Equal(-1, numbers[0]);
        }
    }
}
