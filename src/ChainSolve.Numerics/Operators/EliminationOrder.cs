namespace ChainSolve.Numerics.Operators;

/// <summary>An order of eliminating the states of a pattern, taken as symmetric, and what it costs.</summary>
internal sealed class EliminationOrder
{
    /// <summary>The largest number of entries on one side of the diagonal that an elimination may have.</summary>
    public const long MaxFill = 15_000_000;

    private const int LargeCount = 400_000;
    private const int FillPerLargeState = 6;

    private EliminationOrder(int[]? order, long fill, double updates)
    {
        Order = order;
        Fill = fill;
        Updates = updates;
    }

    /// <summary>The states in the order of their elimination; null where the fill is beyond <see cref="MaxFill"/>.</summary>
    public int[]? Order { get; }

    /// <summary>The entries on one side of the diagonal after filling in.</summary>
    public long Fill { get; }

    /// <summary>The multiplications of the elimination; infinite where the fill is too large.</summary>
    public double Updates { get; }

    public static EliminationOrder Find(SharedPattern pattern, SparseRows rows)
    {
        // Very large chains are worth it only where they hardly fill in, and that shows before much time is spent.
        var limit = rows.Count > LargeCount ? Math.Min(MaxFill, FillPerLargeState * (long)rows.Count) : MaxFill;
        var (offsets, sources) = pattern.Transposed;
        var search = new MinimumDegree(Neighbours(rows, offsets, sources));
        return search.Run(limit) is { } order
            ? new EliminationOrder(order, search.Fill, search.Updates)
            : new EliminationOrder(null, search.Fill, double.PositiveInfinity);
    }

    /// <summary>By state the others that it shares an entry with, in either direction.</summary>
    private static int[][] Neighbours(SparseRows rows, long[] offsets, int[] sources)
    {
        var neighbours = new int[rows.Count][];
        var merged = new List<int>();
        for (var i = 0; i < rows.Count; i++)
        {
            merged.Clear();
            var (a, b) = (rows.Offsets[i], offsets[i]);
            while (a < rows.Offsets[i + 1] || b < offsets[i + 1])
            {
                var left = a < rows.Offsets[i + 1] ? rows.Targets[a] : int.MaxValue;
                var right = b < offsets[i + 1] ? sources[b] : int.MaxValue;
                merged.Add(Math.Min(left, right));
                a += left <= right ? 1 : 0;
                b += right <= left ? 1 : 0;
            }

            neighbours[i] = [.. merged];
        }

        return neighbours;
    }
}
