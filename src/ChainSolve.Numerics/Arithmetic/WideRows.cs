using System.Numerics;

namespace ChainSolve.Numerics.Arithmetic;

/// <summary>
/// The inner loops of products of non-negative matrices whose elements are pairs of doubles, kept in two arrays, high and
/// low parts. A row of the left factor comes as a list of its elements that are not zero.
/// </summary>
/// <remarks>
/// A sum of k products errs by at most 3(k + 3)² units of 2⁻¹⁰⁶, relative: high parts add without error, their rests and the
/// small products are gathered in a second sum that is below (k + 3)·2⁻⁵³ of the first and itself takes 2k roundings.
/// Every product or rest that underflows adds at most 2⁻¹⁰⁷⁴. The vector loops and their twins do the same operations in
/// the same order on each element, so both give the same digits.
/// </remarks>
internal static class WideRows
{
    /// <summary>The relative error of a sum of a number of products, in units of 2⁻¹⁰⁶.</summary>
    public static double ProductUnits(int terms) => 3.0 * (terms + 3) * (terms + 3);

    /// <summary>result[0..columns] = Σ over the list of left element × row of the right factor.</summary>
    /// <param name="places">The rows of the right factor that take part.</param>
    /// <param name="leftHigh">High parts of the left elements, one a place.</param>
    /// <param name="leftLow">Low parts of the left elements, one a place.</param>
    /// <param name="high">High parts of the right factor, row after row.</param>
    /// <param name="low">Low parts of the right factor, row after row.</param>
    /// <param name="columns">The length of a row of the right factor.</param>
    /// <param name="resultHigh">High parts of the result.</param>
    /// <param name="resultLow">Low parts of the result.</param>
    public static void Multiply(
        ReadOnlySpan<int> places,
        ReadOnlySpan<double> leftHigh,
        ReadOnlySpan<double> leftLow,
        double[] high,
        double[] low,
        int columns,
        Span<double> resultHigh,
        Span<double> resultLow)
    {
        var width = Vector<double>.Count;
        var column = 0;
        for (; column <= columns - (2 * width); column += 2 * width)
        {
            var (h0, h1, l0, l1) = (Vector<double>.Zero, Vector<double>.Zero, Vector<double>.Zero, Vector<double>.Zero);
            for (var k = 0; k < places.Length; k++)
            {
                var at = (places[k] * columns) + column;
                var (ah, al) = (new Vector<double>(leftHigh[k]), new Vector<double>(leftLow[k]));
                Accumulate(ah, al, new Vector<double>(high, at), new Vector<double>(low, at), ref h0, ref l0);
                Accumulate(ah, al, new Vector<double>(high, at + width), new Vector<double>(low, at + width), ref h1, ref l1);
            }

            Store(h0, l0, resultHigh[column..], resultLow[column..]);
            Store(h1, l1, resultHigh[(column + width)..], resultLow[(column + width)..]);
        }

        MultiplyPlainly(places, leftHigh, leftLow, high, low, columns, column, resultHigh, resultLow);
    }

    /// <summary>The twin of <see cref="Multiply"/> for a range of columns, one element at a time.</summary>
    public static void MultiplyPlainly(
        ReadOnlySpan<int> places,
        ReadOnlySpan<double> leftHigh,
        ReadOnlySpan<double> leftLow,
        double[] high,
        double[] low,
        int columns,
        int firstColumn,
        Span<double> resultHigh,
        Span<double> resultLow)
    {
        for (var column = firstColumn; column < columns; column++)
        {
            var (sum, rest) = (0.0, 0.0);
            for (var k = 0; k < places.Length; k++)
            {
                var at = (places[k] * columns) + column;
                var product = leftHigh[k] * high[at];
                var small = Math.FusedMultiplyAdd(leftHigh[k], high[at], -product);
                small = Math.FusedMultiplyAdd(leftHigh[k], low[at], small);
                small = Math.FusedMultiplyAdd(leftLow[k], high[at], small);
                var next = sum + product;
                var part = next - sum;
                rest += (sum - (next - part)) + (product - part) + small;
                sum = next;
            }

            resultHigh[column] = sum + rest;
            resultLow[column] = rest - (resultHigh[column] - sum);
        }
    }

    private static void Accumulate(
        Vector<double> ah, Vector<double> al, Vector<double> bh, Vector<double> bl, ref Vector<double> sum, ref Vector<double> rest)
    {
        var product = ah * bh;
        var small = Vector.FusedMultiplyAdd(ah, bh, -product);
        small = Vector.FusedMultiplyAdd(ah, bl, small);
        small = Vector.FusedMultiplyAdd(al, bh, small);
        var next = sum + product;
        var part = next - sum;
        rest += (sum - (next - part)) + (product - part) + small;
        sum = next;
    }

    private static void Store(Vector<double> sum, Vector<double> rest, Span<double> high, Span<double> low)
    {
        var total = sum + rest;
        total.CopyTo(high);
        (rest - (total - sum)).CopyTo(low);
    }
}
