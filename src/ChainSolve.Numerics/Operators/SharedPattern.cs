namespace ChainSolve.Numerics.Operators;

/// <summary>
/// What follows from the places of the entries alone. Generators that were refilled from one another share it, so that
/// a sweep over rates pays for it once. Safe to share between threads.
/// </summary>
internal sealed class SharedPattern
{
    private readonly Lazy<(long[] Offsets, int[] Targets)> transposed;
    private readonly Lazy<EliminationOrder> order;

    public SharedPattern(SparseRows rows)
    {
        transposed = new(rows.TransposePattern);
        order = new(() => EliminationOrder.Find(this, rows));
    }

    /// <summary>The places of the transposed matrix.</summary>
    public (long[] Offsets, int[] Targets) Transposed => transposed.Value;

    /// <summary>An order of elimination with little fill.</summary>
    public EliminationOrder Order => order.Value;
}
