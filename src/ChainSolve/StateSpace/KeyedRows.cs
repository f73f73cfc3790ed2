using System.Numerics;

namespace ChainSolve.StateSpace;

/// <summary>The rows of states that are kept as keys.</summary>
internal sealed class KeyedRows<TKey>(KeySet<TKey> states, SuccessorRow<TKey> row) : StateRows
    where TKey : unmanaged, IBinaryInteger<TKey>
{
    private readonly KeyList<TKey> successors = new();
    private TKey[] keys = [];
    private int[] counts = [];
    private int[] targets = [];
    private double[] rates = [];
    private int rowCount;

    public override ReadOnlySpan<int> Counts => counts.AsSpan(0, rowCount);

    public override ReadOnlySpan<int> Targets => targets.AsSpan(0, successors.Count);

    public override ReadOnlySpan<double> Rates => rates.AsSpan(0, successors.Count);

    public override bool[] Happens() => row.Happens();

    public override bool TryRead(int first, int count)
    {
        if (keys.Length < count)
        {
            (keys, counts) = (new TKey[count], new int[count]);
        }

        states.CopyKeys(first, keys.AsSpan(0, count));
        rowCount = count;
        successors.Clear();
        for (var i = 0; i < count; i++)
        {
            row.Find(keys[i]);
            counts[i] = row.Count;
            if (successors.Count + row.Count > rates.Length)
            {
                Array.Resize(ref rates, (int)Math.Min(Array.MaxLength, 2L * (successors.Count + row.Count)));
            }

            row.Rates.CopyTo(rates.AsSpan(successors.Count));
            successors.Add(row.Keys);
        }

        if (targets.Length < successors.Count)
        {
            targets = new int[rates.Length];
        }

        states.Find(successors.Keys, targets);
        return !Targets.Contains(-1);
    }
}
