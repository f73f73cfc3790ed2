using ChainSolve.Numerics.Arithmetic;
using ChainSolve.Tests.Shared.Reference;

namespace ChainSolve.Numerics.Tests.Arithmetic;

public class WideRowsTests
{
    [Theory]
    [InlineData(1, 1)]
    [InlineData(3, 7)]
    [InlineData(40, 8)]
    [InlineData(17, 37)]
    public void Multiply_AnyShape_HasTheDigitsOfItsTwinAndStaysWithinItsBound(int terms, int columns)
    {
        var random = new Random(terms);
        var (leftHigh, leftLow) = Numbers(random, terms);
        var (high, low) = Numbers(random, (terms + 2) * columns);
        int[] places = [.. Enumerable.Range(0, terms).Select(k => k + (k > terms / 2 ? 2 : 0))];
        var (fastHigh, fastLow) = (new double[columns], new double[columns]);
        var (plainHigh, plainLow) = (new double[columns], new double[columns]);
        WideRows.Multiply(places, leftHigh, leftLow, high, low, columns, fastHigh, fastLow);
        WideRows.MultiplyPlainly(places, leftHigh, leftLow, high, low, columns, 0, plainHigh, plainLow);

        Assert.Equal(plainHigh, fastHigh);
        Assert.Equal(plainLow, fastLow);
        for (var j = 0; j < columns; j++)
        {
            var sum = BigFloat.Zero;
            for (var k = 0; k < terms; k++)
            {
                var at = (places[k] * columns) + j;
                sum += ((BigFloat)leftHigh[k] + leftLow[k]) * ((BigFloat)high[at] + low[at]);
            }

            var error = ((BigFloat)fastHigh[j] + fastLow[j] - sum).Abs / sum;
            Assert.InRange(error.ToDouble(), 0, WideRows.ProductUnits(terms) * DoubleDouble.Unit);
        }
    }

    private static (double[] High, double[] Low) Numbers(Random random, int count)
    {
        DoubleDouble[] numbers = [.. Enumerable.Range(0, count).Select(_ => DoubleDoubleTests.Number(random))];
        return ([.. numbers.Select(n => n.High)], [.. numbers.Select(n => n.Low)]);
    }
}
