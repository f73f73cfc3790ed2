namespace ChainSolve.Numerics.Operators;

/// <summary>
/// The generator Q of a continuous-time Markov chain: non-negative rates between states, stored by rows; the diagonal is
/// derived as minus the sum of a row and never stored.
/// </summary>
/// <remarks>Immutable; safe to share between threads. Rates are per unit of time, whatever unit the caller chose.</remarks>
public sealed class Generator
{
    private readonly Lazy<SparseRows> columns;

    internal Generator(SparseRows rows)
    {
        Rows = rows;
        columns = new Lazy<SparseRows>(rows.Transpose);
        ExitRates = rows.RowSums();
    }

    /// <summary>The number of states.</summary>
    public int StateCount => Rows.Count;

    /// <summary>The number of stored rates; those that are zero but kept in the pattern count too.</summary>
    public long TransitionCount => Rows.EntryCount;

    /// <summary>The largest exit rate of any state; 0 for a chain without transitions.</summary>
    public double MaxExitRate => ExitRates.Length == 0 ? 0 : ExitRates.Max();

    /// <summary>The rates out of each state: row i holds the targets of i, ascending.</summary>
    internal SparseRows Rows { get; }

    /// <summary>The rates into each state: row j holds the sources of j, ascending. Built on first use.</summary>
    internal SparseRows Columns => columns.Value;

    /// <summary>The sum of the rates out of each state.</summary>
    internal double[] ExitRates { get; }

    /// <summary>The rate from one state to another; 0 where there is no transition.</summary>
    public double Rate(int from, int to)
    {
        ArgumentOutOfRangeException.ThrowIfNegative(from);
        ArgumentOutOfRangeException.ThrowIfGreaterThanOrEqual(from, StateCount);
        ArgumentOutOfRangeException.ThrowIfNegative(to);
        ArgumentOutOfRangeException.ThrowIfGreaterThanOrEqual(to, StateCount);
        return Rows.Find(from, to);
    }
}
