namespace ChainSolve.Numerics.Operators;

/// <summary>A sparse square matrix of non-negative entries by rows, without its diagonal.</summary>
/// <remarks>Immutable by contract: nobody writes into the arrays after construction.</remarks>
internal sealed class SparseRows
{
    private const int RowsBetweenLooks = 1 << 16;

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

    /// <summary>The places of the transposed matrix, rows ascending within a column.</summary>
    public (long[] Offsets, int[] Targets) TransposePattern()
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
        for (var i = 0; i < Count; i++)
        {
            for (var e = Offsets[i]; e < Offsets[i + 1]; e++)
            {
                targets[next[Targets[e]]++] = i;
            }
        }

        return (offsets, targets);
    }

    /// <summary>The transposed matrix on places that <see cref="TransposePattern"/> gave for this pattern.</summary>
    public SparseRows Transpose((long[] Offsets, int[] Targets) places)
    {
        var next = (long[])places.Offsets.Clone();
        var values = new double[EntryCount];
        for (long e = 0; e < EntryCount; e++)
        {
            values[next[Targets[e]]++] = Values[e];
        }

        return new SparseRows(Count, places.Offsets, places.Targets, values);
    }

    /// <summary>Checks places and values in one pass.</summary>
    /// <returns>The sums of the rows, as <see cref="RowSums"/> gives them.</returns>
    public double[] Check(string valuesName, CancellationToken cancellation)
    {
        var sums = new double[Count];
        for (var i = 0; i < Count; i++)
        {
            if (i % RowsBetweenLooks == 0)
            {
                cancellation.ThrowIfCancellationRequested();
            }

            if (Offsets[i + 1] < Offsets[i] || Offsets[i + 1] > EntryCount)
            {
                throw new ArgumentException($"The offsets fall or run past the end at state {i}.");
            }

            var (last, sum) = (-1, 0.0);
            for (var e = Offsets[i]; e < Offsets[i + 1]; e++)
            {
                var target = Targets[e];
                if (target < 0 || target >= Count || target == i)
                {
                    throw new ArgumentException($"State {i} has a transition to {target}; it must be another state from 0 to {Count - 1}.");
                }

                if (target <= last)
                {
                    throw new ArgumentException($"The targets of state {i} do not ascend: {last} is followed by {target}.");
                }

                CheckValue(e, valuesName);
                last = target;
                sum += Values[e];
            }

            sums[i] = sum;
        }

        return sums;
    }

    public void CheckValues(string name)
    {
        for (long e = 0; e < EntryCount; e++)
        {
            CheckValue(e, name);
        }
    }

    private void CheckValue(long entry, string name)
    {
        if (!double.IsFinite(Values[entry]) || Values[entry] < 0)
        {
            throw new ArgumentException($"Rate {entry} is {Values[entry]}; rates must be finite and not negative.", name);
        }
    }
}
