using ChainSolve.Numerics.Arithmetic;
using ChainSolve.Tests.Shared.Reference;

namespace ChainSolve.Numerics.Tests.Arithmetic;

public class WideNumberTests
{
    [Fact]
    public void Arithmetic_OnManyRandomNumbers_IsWithinEpsilon()
    {
        var random = new Random(4711);
        var worst = 0.0;
        for (var k = 0; k < 20_000; k++)
        {
            // A third and a seventh of random doubles use both parts.
            var (p, q) = (Any(random), Any(random));
            var (a, b) = (p / 3.0, q / 7.0);
            var (x, y) = (Exact(a), Exact(b));
            worst = Math.Max(worst, Off(a + b, x + y));
            worst = Math.Max(worst, Off(a * b, x * y));
            worst = Math.Max(worst, Off(a / b, x / y));
        }

        Assert.InRange(worst, 1e-34, WideNumber.Epsilon);
    }

    [Fact]
    public void Multiply_FarBelowTheRangeOfADouble_ComesBack()
    {
        WideNumber tiny = 1e-12;
        var product = WideNumber.One;
        for (var k = 0; k < 500; k++)
        {
            product *= tiny;
        }

        Assert.Equal(double.Epsilon, product.ToDouble());
        for (var k = 0; k < 500; k++)
        {
            product /= tiny;
        }

        Assert.InRange(product.DistanceFromOne(), 0, 1e-27);
    }

    [Theory]
    [InlineData(0)]
    [InlineData(5e-324)]
    [InlineData(2.3e-308)]
    [InlineData(1)]
    [InlineData(1.7e308)]
    public void ToDouble_OfADouble_IsTheSame(double value) => Assert.Equal(value, ((WideNumber)value).ToDouble());

    [Fact]
    public void Compare_OfNumbersFarApart_SeesTheOrder()
    {
        WideNumber[] ascending = [0, 1e-300, 1e-200, 1e-77, 1e-76, 1, 1e76, 1e77, 1e78, 1e300];
        for (var i = 0; i < ascending.Length; i++)
        {
            for (var j = 0; j < ascending.Length; j++)
            {
                Assert.Equal(i < j, ascending[i] < ascending[j]);
                Assert.Equal(i > j, ascending[i] > ascending[j]);
            }
        }
    }

    private static WideNumber Any(Random random) => (1 + random.NextDouble()) * Math.Pow(2, random.Next(-400, 400));

    private static BigFloat Exact(WideNumber value)
    {
        var high = value.ToDouble();
        var (sign, rest) = value.Rest();
        return high + ((BigFloat)rest * (double)sign);
    }

    private static double Off(WideNumber value, BigFloat expected) => ((Exact(value) - expected) / expected).Abs.ToDouble();
}
