using System.Numerics;

namespace ChainSolve.StateSpace;

/// <summary>A set of keys with the number of each in the order of arrival: open addressing, linear probing, no removal.</summary>
internal sealed class KeyTable<TKey>
    where TKey : unmanaged, IBinaryInteger<TKey>
{
    private TKey[] keys = new TKey[16];
    private int[] slots = new int[64];

    public int Count { get; private set; }

    public ReadOnlySpan<TKey> Keys => keys.AsSpan(0, Count);

    public TKey this[int number] => keys[number];

    /// <summary>Adds a key unless it is there; says whether it was added.</summary>
    public bool Add(TKey key)
    {
        if (Count * 2L >= slots.LongLength)
        {
            Grow();
        }

        var slot = Find(slots, key);
        if (slots[slot] != 0)
        {
            return false;
        }

        if (Count == keys.Length)
        {
            Array.Resize(ref keys, (int)Math.Min(2L * keys.Length, Array.MaxLength));
        }

        keys[Count++] = key;
        slots[slot] = Count;
        return true;
    }

    /// <summary>The number of a key, or -1.</summary>
    public int IndexOf(TKey key) => slots[Find(slots, key)] - 1;

    /// <summary>Numbers the keys by their order from now on.</summary>
    public void Sort()
    {
        Array.Resize(ref keys, Math.Max(1, Count));
        Array.Sort(keys, 0, Count);
        Array.Clear(slots);
        for (var i = 0; i < Count; i++)
        {
            slots[Find(slots, keys[i])] = i + 1;
        }
    }

    private void Grow()
    {
        var grown = new int[Math.Min(slots.LongLength * 2, 1L << 30)];
        for (var i = 0; i < Count; i++)
        {
            grown[Find(grown, keys[i])] = i + 1;
        }

        slots = grown;
    }

    private int Find(int[] table, TKey key)
    {
        var mask = table.Length - 1;
        var slot = (int)(Hash(key) >> 20) & mask;
        while (table[slot] != 0 && keys[table[slot] - 1] != key)
        {
            slot = (slot + 1) & mask;
        }

        return slot;
    }

    // Multiplication by an odd number near 2^64 over the golden ratio spreads neighbouring keys (Knuth, The Art of Computer Programming 3, 6.4).
    private static ulong Hash(TKey key)
    {
        var low = ulong.CreateTruncating(key);
        var high = typeof(TKey) == typeof(ulong) ? 0 : ulong.CreateTruncating(key >> 32) >> 32;
        var mixed = (low ^ (high * 0xff51afd7ed558ccdUL)) * 0x9e3779b97f4a7c15UL;
        return mixed ^ (mixed >> 29);
    }
}
