using ChainSolve.Numerics.Arithmetic;

namespace ChainSolve.Numerics.Transient;

/// <summary>
/// A block of non-negative numbers, each of two doubles and with a bound on its error: rows of a transition matrix, or
/// columns of rewards. Written by one owner, then only read.
/// </summary>
internal sealed class WideBlock
{
    /// <summary>Bounds are kept times 2¹⁰⁰, so that they are normal doubles wherever the values are.</summary>
    public const int BoundPower = 100;

    public static readonly double BoundScale = Math.ScaleB(1, BoundPower);

    public WideBlock(int rows, int columns)
    {
        Rows = rows;
        Columns = columns;
        High = new double[(long)rows * columns];
        Low = new double[High.Length];
        Bound = new double[High.Length];
    }

    public int Rows { get; }

    public int Columns { get; }

    public double[] High { get; }

    public double[] Low { get; }

    /// <summary>The error of each element is at most this times 2⁻¹⁰⁰.</summary>
    public double[] Bound { get; }

    /// <summary>How far the sum of the errors of a row may be from zero, relative to the row's sum: rows are kept at a known sum.</summary>
    public double Slack { get; set; }

    /// <summary>
    /// Which elements can be other than zero, by paths along positive rates; null where all can. The others are exactly
    /// zero with bound zero, so that no error creeps in where nothing can happen.
    /// </summary>
    public bool[]? Pattern { get; set; }

    public DoubleDouble this[int row, int column]
    {
        get => Of((row * Columns) + column);
        set => Set((row * Columns) + column, value);
    }

    /// <summary>Exact numbers as the columns of a block, some of their entries picked in order; rows beyond them are zero.</summary>
    public static WideBlock FromColumns(IReadOnlyList<double[]> columns, int[] entries, int rows)
    {
        var block = new WideBlock(rows, columns.Count);
        for (var c = 0; c < columns.Count; c++)
        {
            for (var i = 0; i < entries.Length; i++)
            {
                block.High[(i * columns.Count) + c] = columns[c][entries[i]];
            }
        }

        return block;
    }

    public DoubleDouble Of(int at) => DoubleDouble.Of(High[at], Low[at]);

    public void Set(int at, DoubleDouble value)
    {
        High[at] = value.High;
        Low[at] = value.Low;
    }

    /// <summary>Takes the bounds away where the element cannot be other than zero.</summary>
    public void ApplyPattern(int row)
    {
        for (var at = row * Columns; Pattern is not null && at < (row + 1) * Columns; at++)
        {
            Bound[at] = Pattern[at] ? Bound[at] : 0;
        }
    }

    /// <summary>The sum of a row, within <see cref="WideRows.ProductUnits"/>.</summary>
    public DoubleDouble RowSum(int row)
    {
        DoubleDouble sum = 0;
        for (var at = row * Columns; at < (row + 1) * Columns; at++)
        {
            sum += Of(at);
        }

        return sum;
    }

    /// <summary>An element rounded to a double, and an absolute bound on what that is off.</summary>
    public (double Value, double Bound) Rounded(int row, int column)
    {
        var at = (row * Columns) + column;
        var bound = Math.Abs(Low[at]) + Math.ScaleB(Bound[at], -BoundPower);
        return (High[at], Low[at] == 0 && Bound[at] == 0 ? 0 : Math.BitIncrement(bound * (1 + 1e-15)));
    }
}
