using ChainSolve.Numerics.Arithmetic;
using ChainSolve.Numerics.Structure;

namespace ChainSolve.Numerics.Operators;

/// <summary>
/// The generator Q of a continuous-time Markov chain: non-negative rates between states, stored by rows; the diagonal is
/// derived as minus the sum of a row and never stored.
/// </summary>
/// <remarks>Immutable; safe to share between threads. Rates are per unit of time, whatever unit the caller chose.</remarks>
public sealed class Generator
{
    private readonly Lazy<SparseRows> columns;
    private readonly SharedPattern pattern;
    private ChainClasses? classes;

    internal Generator(SparseRows rows, double[]? exitRates = null, SharedPattern? pattern = null)
    {
        Rows = rows;
        this.pattern = pattern ?? new SharedPattern(rows);
        columns = new Lazy<SparseRows>(() => Rows.Transpose(this.pattern.Transposed));
        ExitRates = exitRates ?? rows.RowSums();
        foreach (var rate in ExitRates)
        {
            MaxExitRate = Math.Max(MaxExitRate, rate);
        }

        if (double.IsInfinity(MaxExitRate))
        {
            throw new ArgumentException(
                $"The rates out of state {Array.IndexOf(ExitRates, MaxExitRate)} add up to more than a double holds. Choose a shorter unit of time.");
        }
    }

    /// <summary>The number of states.</summary>
    public int StateCount => Rows.Count;

    /// <summary>The number of stored rates; those that are zero but kept in the pattern count too.</summary>
    public long TransitionCount => Rows.EntryCount;

    /// <summary>The largest exit rate of any state; 0 for a chain without transitions.</summary>
    public double MaxExitRate { get; }

    /// <summary>The rates out of each state: row i holds the targets of i, ascending.</summary>
    internal SparseRows Rows { get; }

    /// <summary>The rates into each state: row j holds the sources of j, ascending. Built on first use.</summary>
    internal SparseRows Columns => columns.Value;

    /// <summary>The sum of the rates out of each state.</summary>
    internal double[] ExitRates { get; }

    /// <summary>The classes of all states; null until somebody has found them. Several threads may each find them, and one result is kept.</summary>
    internal ChainClasses? Classes
    {
        get => Volatile.Read(ref classes);
        set => Volatile.Write(ref classes, value);
    }

    /// <summary>What follows from the places of the entries alone, shared with refilled twins.</summary>
    internal SharedPattern Pattern => pattern;

    /// <summary>Makes a generator of rows that are at hand, without sorting and without copying.</summary>
    /// <param name="rowOffsets">The entries of row i stand at <c>[rowOffsets[i], rowOffsets[i + 1])</c>; one more than there are states.</param>
    /// <param name="targets">The state that each entry leads to; ascending within a row, never the row's own state.</param>
    /// <param name="rates">The rate of each entry; finite and not negative. A zero stays in the pattern.</param>
    /// <remarks>The arrays are taken over: do not write to them afterwards. Costs one pass over the entries.</remarks>
    /// <exception cref="ArgumentException">The arrays do not describe a generator; the message says where.</exception>
    public static Generator FromRows(long[] rowOffsets, int[] targets, double[] rates) => FromRows(rowOffsets, targets, rates, CancellationToken.None);

    /// <summary>Makes a generator of rows that are at hand, without sorting and without copying; can be stopped.</summary>
    /// <param name="rowOffsets">The entries of row i stand at <c>[rowOffsets[i], rowOffsets[i + 1])</c>; one more than there are states.</param>
    /// <param name="targets">The state that each entry leads to; ascending within a row, never the row's own state.</param>
    /// <param name="rates">The rate of each entry; finite and not negative. A zero stays in the pattern.</param>
    /// <param name="cancellation">Stops the pass over the entries.</param>
    /// <remarks>The arrays are taken over: do not write to them afterwards. Costs one pass over the entries.</remarks>
    /// <exception cref="ArgumentException">The arrays do not describe a generator; the message says where.</exception>
    /// <exception cref="OperationCanceledException">The token was cancelled.</exception>
    public static Generator FromRows(long[] rowOffsets, int[] targets, double[] rates, CancellationToken cancellation)
    {
        ArgumentNullException.ThrowIfNull(rowOffsets);
        ArgumentNullException.ThrowIfNull(targets);
        ArgumentNullException.ThrowIfNull(rates);
        if (rowOffsets.Length < 2)
        {
            throw new ArgumentException("A chain has at least one state: two offsets.", nameof(rowOffsets));
        }

        if (rowOffsets[0] != 0 || rowOffsets[^1] != targets.LongLength || targets.LongLength != rates.LongLength)
        {
            throw new ArgumentException(
                $"The offsets span {rowOffsets[0]} to {rowOffsets[^1]}, but there are {targets.LongLength} targets and {rates.LongLength} rates.",
                nameof(rowOffsets));
        }

        var rows = new SparseRows(rowOffsets.Length - 1, rowOffsets, targets, rates);
        return new Generator(rows, rows.Check(nameof(rates), cancellation));
    }

    /// <summary>The rate from one state to another; 0 where there is no transition.</summary>
    public double Rate(int from, int to)
    {
        CheckState(from, nameof(from));
        CheckState(to, nameof(to));
        return Rows.Find(from, to);
    }

    /// <summary>The sum of the rates out of a state.</summary>
    public double ExitRate(int state)
    {
        CheckState(state, nameof(state));
        return ExitRates[state];
    }

    /// <summary>How fast a set of states is entered from each state outside of it.</summary>
    /// <param name="states">True for the states of the set; one entry a state.</param>
    /// <returns>A new array: the sum of the rates into the set, right to one rounding; 0 for the states of the set themselves.</returns>
    /// <remarks>Costs one pass over the transitions.</remarks>
    /// <exception cref="ArgumentException">The set has another length than the chain.</exception>
    public double[] RatesInto(bool[] states)
    {
        StartCheck.Length(this, states, nameof(states));
        var result = new double[StateCount];
        for (var i = 0; i < result.Length; i++)
        {
            LongSum sum = default;
            for (var e = Rows.Offsets[i]; !states[i] && e < Rows.Offsets[i + 1]; e++)
            {
                if (states[Rows.Targets[e]])
                {
                    sum.Add(Rows.Values[e]);
                }
            }

            result[i] = sum.Value;
        }

        return result;
    }

    /// <summary>The transitions out of a state, by ascending target.</summary>
    /// <exception cref="ArgumentOutOfRangeException">There is no such state.</exception>
    public IEnumerable<Transition> TransitionsFrom(int state)
    {
        CheckState(state, nameof(state));
        return Walk(state);
    }

    /// <summary>The same pattern with other rates; what was found of the pattern is kept.</summary>
    /// <param name="rates">One rate for each stored entry, row after row in the order of <see cref="TransitionsFrom"/>; zeros are legal.</param>
    /// <remarks>The array is taken over: do not write to it afterwards.</remarks>
    /// <exception cref="ArgumentException">The number of rates is not <see cref="TransitionCount"/>, or one is negative or not finite.</exception>
    public Generator WithRates(double[] rates)
    {
        ArgumentNullException.ThrowIfNull(rates);
        if (rates.LongLength != TransitionCount)
        {
            throw new ArgumentException($"{TransitionCount} rates are needed and {rates.LongLength} were given.", nameof(rates));
        }

        var rows = new SparseRows(Rows.Count, Rows.Offsets, Rows.Targets, rates);
        rows.CheckValues(nameof(rates));
        return new Generator(rows, pattern: pattern);
    }

    private IEnumerable<Transition> Walk(int state)
    {
        for (var e = Rows.Offsets[state]; e < Rows.Offsets[state + 1]; e++)
        {
            yield return new Transition(Rows.Targets[e], Rows.Values[e]);
        }
    }

    private void CheckState(int state, string name)
    {
        ArgumentOutOfRangeException.ThrowIfNegative(state, name);
        ArgumentOutOfRangeException.ThrowIfGreaterThanOrEqual(state, StateCount, name);
    }
}
