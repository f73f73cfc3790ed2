namespace ChainSolve.StateSpace;

/// <summary>Keys one behind the other, written in runs.</summary>
internal sealed class KeyList<TKey>
{
    private TKey[] keys = [];

    public int Count { get; private set; }

    public ReadOnlySpan<TKey> Keys => keys.AsSpan(0, Count);

    public long Capacity => keys.LongLength;

    public TKey this[int at] => keys[at];

    /// <summary>Room behind the last key; what was written there belongs to the list once it is taken.</summary>
    public Span<TKey> Room(int count)
    {
        if (keys.Length - Count < count)
        {
            Array.Resize(ref keys, (int)Math.Max(Count + (long)count, Math.Min(2L * keys.Length, Array.MaxLength)));
        }

        return keys.AsSpan(Count, count);
    }

    public void Take(int count) => Count += count;

    public void Add(ReadOnlySpan<TKey> added)
    {
        added.CopyTo(Room(added.Length));
        Take(added.Length);
    }

    /// <summary>Adds a key where there is room for it already.</summary>
    public void AddToRoom(TKey key) => keys[Count++] = key;

    public void Clear() => Count = 0;
}
