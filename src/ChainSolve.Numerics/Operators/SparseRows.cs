namespace ChainSolve.Numerics.Operators;

/// <summary>A sparse square matrix of non-negative entries by rows, without its diagonal.</summary>
/// <remarks>Immutable by contract: nobody writes into the arrays after construction.</remarks>
internal sealed class SparseRows
{
    public SparseRows(int count, long[] offsets, int[] targets, double[] values)
    {
        Count = count;
        Offsets = offsets;
        Targets = targets;
        Values = values;
    }

    /// <summary>The number of rows, and of columns.</summary>
    public int Count { get; }

    /// <summary>Entries of row i stand at <c>[Offsets[i], Offsets[i + 1])</c>; length Count + 1.</summary>
    public long[] Offsets { get; }

    /// <summary>Column of each entry, ascending within a row, never the row's own number.</summary>
    public int[] Targets { get; }

    /// <summary>Value of each entry; not negative.</summary>
    public double[] Values { get; }

    public long EntryCount => Offsets[Count];

    public double Find(int row, int column)
    {
        var start = (int)Offsets[row];
        var at = Array.BinarySearch(Targets, start, (int)Offsets[row + 1] - start, column);
        return at >= 0 ? Values[at] : 0;
    }

    public double[] RowSums()
    {
        var sums = new double[Count];
        for (var i = 0; i < Count; i++)
        {
            var sum = 0.0;
            for (var e = Offsets[i]; e < Offsets[i + 1]; e++)
            {
                sum += Values[e];
            }

            sums[i] = sum;
        }

        return sums;
    }

    public SparseRows Transpose()
    {
        var offsets = new long[Count + 1];
        for (long e = 0; e < EntryCount; e++)
        {
            offsets[Targets[e] + 1]++;
        }

        for (var i = 0; i < Count; i++)
        {
            offsets[i + 1] += offsets[i];
        }

        var next = (long[])offsets.Clone();
        var targets = new int[EntryCount];
        var values = new double[EntryCount];
        for (var i = 0; i < Count; i++)
        {
            for (var e = Offsets[i]; e < Offsets[i + 1]; e++)
            {
                var at = next[Targets[e]]++;
                targets[at] = i;
                values[at] = Values[e];
            }
        }

        return new SparseRows(Count, offsets, targets, values);
    }
}
