using System.Numerics;

namespace ChainSolve.StateSpace;

/// <summary>The rows of states that are kept as keys.</summary>
internal sealed class KeyedRows<TKey>(KeySet<TKey> states, SuccessorRow<TKey> row) : StateRows
    where TKey : unmanaged, IBinaryInteger<TKey>
{
    private TKey[] keys = [];
    private int[] counts = [];
    private int[] targets = [];
    private double[] rates = [];
    private int rowCount;
    private int entryCount;

    public override ReadOnlySpan<int> Counts => counts.AsSpan(0, rowCount);

    public override ReadOnlySpan<int> Targets => targets.AsSpan(0, entryCount);

    public override ReadOnlySpan<double> Rates => rates.AsSpan(0, entryCount);

    public override bool[] Happens() => row.Happens();

    public override bool TryRead(int first, int count)
    {
        if (keys.Length < count)
        {
            (keys, counts) = (new TKey[count], new int[count]);
        }

        states.CopyKeys(first, keys.AsSpan(0, count));
        (rowCount, entryCount) = (count, 0);
        for (var i = 0; i < count; i++)
        {
            row.Find(keys[i]);
            counts[i] = row.Count;
            if (entryCount + row.Count > targets.Length)
            {
                var room = (int)Math.Min(Array.MaxLength, 2L * (entryCount + row.Count));
                Array.Resize(ref targets, room);
                Array.Resize(ref rates, room);
            }

            var found = targets.AsSpan(entryCount, row.Count);
            states.Find(row.Keys, found);
            if (found.Contains(-1))
            {
                return false;
            }

            row.Rates.CopyTo(rates.AsSpan(entryCount));
            entryCount += row.Count;
        }

        return true;
    }
}
