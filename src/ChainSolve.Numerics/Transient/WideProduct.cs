using System.Numerics;
using ChainSolve.Numerics.Arithmetic;

namespace ChainSolve.Numerics.Transient;

/// <summary>Products of blocks of non-negative numbers that carry a bound for every element.</summary>
/// <remarks>
/// <para>
/// With a = A + D and b = B + F the computed factors, ab − AB = aF + DB. Rows of A have a known sum, to which they are
/// scaled, so that the errors in a row of D add up to next to nothing and DB = D(B − 1c) for any row c; taking for c the
/// row that comes out, |DB| is at most Σ |D_ik| |B_kj − c_j|. Where the rows of B have become alike that vanishes, and
/// where A is close to the identity only what leads away counts. Errors therefore do not double when a matrix is squared:
/// they grow with the number of squarings, and with the exponent of what decays.
/// </para>
/// <para>
/// Relative to the result, rounding adds less than <see cref="RoundingUnits"/> units of 2⁻¹⁰⁶: the product itself, the sum
/// of the row, and the scaling to it. The bounds are computed in plain doubles and widened for their own rounding.
/// </para>
/// </remarks>
internal static class WideProduct
{
    // Half the spacing of doubles at one.
    private const double Half = 1.0 / (1L << 53);

    // A product or a rest that underflows errs by less than 2^-1074; a term has fewer than 16 of them.
    private static readonly double Underflow = Math.ScaleB(1, -1070 + WideBlock.BoundPower);

    /// <summary>A bound on the rounding of one product of blocks, scaling included, in units of 2⁻¹⁰⁶.</summary>
    public static double RoundingUnits(int terms) => 20.0 * (terms + 8) * (terms + 8);

    /// <summary>A bound on the slack of rows that were scaled to their sum.</summary>
    public static double SlackOf(int columns) => (WideRows.ProductUnits(columns) + 40) * DoubleDouble.Unit;

    /// <summary>The product of rows of known sums and a block.</summary>
    /// <param name="left">The rows; their errors in a row add up to at most their slack times their sum.</param>
    /// <param name="sums">The true sums of the rows of the left factor; null where all are one.</param>
    /// <param name="right">The block.</param>
    /// <param name="pattern">Where the result can be other than zero; null for everywhere.</param>
    /// <param name="isStochastic">Whether the rows of the right factor add to one; then the result's rows are scaled to the sums of the left.</param>
    /// <param name="cancellation">Looked at once a row.</param>
    public static WideBlock Of(
        WideBlock left, DoubleDouble[]? sums, WideBlock right, bool[]? pattern, bool isStochastic, CancellationToken cancellation)
    {
        var (terms, columns) = (left.Columns, right.Columns);
        var result = new WideBlock(left.Rows, columns) { Pattern = pattern };
        var places = new int[terms];
        var (high, low) = (new double[terms], new double[terms]);
        var (size, error) = (new double[terms], new double[terms]);
        for (var i = 0; i < left.Rows; i++)
        {
            cancellation.ThrowIfCancellationRequested();
            var sum = sums is null ? DoubleDouble.One : sums[i];
            var count = 0;
            for (var k = 0; k < terms; k++)
            {
                var at = (i * terms) + k;
                if (left.High[at] != 0)
                {
                    (places[count], high[count], low[count]) = (k, left.High[at], left.Low[at]);
                    count++;
                }
            }

            WideRows.Multiply(
                places.AsSpan(0, count), high, low, right.High, right.Low, columns,
                result.High.AsSpan(i * columns, columns), result.Low.AsSpan(i * columns, columns));

            var errors = 0.0;
            count = 0;
            for (var k = 0; k < terms; k++)
            {
                var at = (i * terms) + k;
                var reach = left.High[at] + Math.ScaleB(left.Bound[at], -WideBlock.BoundPower);
                if (reach != 0 || left.Bound[at] != 0)
                {
                    (places[count], size[count], error[count]) = (k, reach, left.Bound[at]);
                    errors += error[count];
                    count++;
                }
            }

            var fresh = (left.Slack * sum.High * WideBlock.BoundScale) + (2 * Half * errors)
                + (RoundingUnits(terms) * DoubleDouble.Unit * WideBlock.BoundScale);
            Bounds(places.AsSpan(0, count), size, error, right, result, i, fresh, terms);
            result.ApplyPattern(i);
            if (isStochastic)
            {
                Scale(result, i, sum);
            }
        }

        result.Slack = isStochastic ? SlackOf(columns) : double.NaN;
        return result;
    }

    /// <summary>Scales a row to its true sum, and bounds the error of its most uncertain element by those of the others.</summary>
    public static void Scale(WideBlock block, int row, DoubleDouble sum)
    {
        var factor = sum / block.RowSum(row);
        var first = row * block.Columns;
        var (worst, total) = (first, 0.0);
        for (var at = first; at < first + block.Columns; at++)
        {
            block.Set(at, block.Of(at) * factor);
            total += block.Bound[at];
            worst = block.Bound[at] > block.Bound[worst] ? at : worst;
        }

        // Sum again without the worst: a difference would lose it.
        var others = SlackOf(block.Columns) * sum.High * WideBlock.BoundScale;
        for (var at = first; at < first + block.Columns; at++)
        {
            others += at == worst ? 0 : block.Bound[at];
        }

        block.Bound[worst] = Math.Min(block.Bound[worst], others * (1 + (4 * Half * (block.Columns + 4))));
    }

    private static void Bounds(
        ReadOnlySpan<int> places, double[] size, double[] error, WideBlock right, WideBlock result, int row, double fresh, int terms)
    {
        var (width, columns) = (Vector<double>.Count, right.Columns);
        var first = row * columns;
        var widening = 1 + (4 * Half * (terms + 8));
        var column = 0;
        for (; column <= columns - width; column += width)
        {
            var center = new Vector<double>(result.High, first + column);
            var sum = center * fresh;
            for (var k = 0; k < places.Length; k++)
            {
                var at = (places[k] * columns) + column;
                sum = Vector.FusedMultiplyAdd(new Vector<double>(size[k]), new Vector<double>(right.Bound, at), sum);
                sum = Vector.FusedMultiplyAdd(new Vector<double>(error[k]), Vector.Abs(new Vector<double>(right.High, at) - center), sum);
            }

            ((sum * widening) + new Vector<double>(Underflow * (terms + 1))).CopyTo(result.Bound, first + column);
        }

        for (; column < columns; column++)
        {
            var center = result.High[first + column];
            var sum = center * fresh;
            for (var k = 0; k < places.Length; k++)
            {
                var at = (places[k] * columns) + column;
                sum = Math.FusedMultiplyAdd(size[k], right.Bound[at], sum);
                sum = Math.FusedMultiplyAdd(error[k], Math.Abs(right.High[at] - center), sum);
            }

            result.Bound[first + column] = (sum * widening) + (Underflow * (terms + 1));
        }
    }
}
