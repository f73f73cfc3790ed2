using System.Numerics;

namespace ChainSolve.StateSpace;

/// <summary>A set of keys with the number of each in the order of arrival: open addressing, linear probing, no removal.</summary>
internal sealed class KeyTable<TKey>
    where TKey : unmanaged, IBinaryInteger<TKey>
{
    private TKey[] keys = new TKey[16];
    private int[] slots = new int[64];

    public int Count { get; private set; }

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
        var slot = (int)(KeyHash.Of(key) >> 32) & mask;
        while (table[slot] != 0 && keys[table[slot] - 1] != key)
        {
            slot = (slot + 1) & mask;
        }

        return slot;
    }
}
