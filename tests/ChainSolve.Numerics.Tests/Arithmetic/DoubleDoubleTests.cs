using ChainSolve.Numerics.Arithmetic;
using ChainSolve.Tests.Shared.Reference;

namespace ChainSolve.Numerics.Tests.Arithmetic;

/// <summary>Against 256-bit numbers. The error bounds are those of Joldes, Muller and Popescu (2017), from memory.</summary>
public class DoubleDoubleTests
{
    private const int Count = 4000;

    [Fact]
    public void Sum_OfPositiveNumbers_StaysWithinItsBound() => Check(3, (a, b) => a + b, (a, b) => a + b);

    [Fact]
    public void Sum_WithADouble_StaysWithinItsBound() => Check(2, (a, b) => a + b.High, (a, b) => a + b, b => b.High);

    [Fact]
    public void Product_StaysWithinItsBound() => Check(5, (a, b) => a * b, (a, b) => a * b);

    [Fact]
    public void Product_WithADouble_StaysWithinItsBound() => Check(2, (a, b) => a * b.High, (a, b) => a * b, b => b.High);

    [Fact]
    public void Quotient_StaysWithinItsBound() => Check(15, (a, b) => a / b, (a, b) => a / b);

    [Fact]
    public void Difference_OfFarApartNumbers_StaysWithinTwiceTheBound() =>
        Check(6, (a, b) => a + a + a + b - b, (a, _) => a * 3, scale: (a, b) => (a * 3) + b);

    [Fact]
    public void SumAndProduct_OfTwoDoubles_AreExact()
    {
        var random = new Random(4);
        for (var i = 0; i < Count; i++)
        {
            var (a, b) = (Number(random).High, Number(random).High);
            Assert.True((Exact(DoubleDouble.Sum(a, b)) - ((BigFloat)a + b)).IsZero);
            Assert.True((Exact(DoubleDouble.Product(a, b)) - ((BigFloat)a * b)).IsZero);
        }
    }

    [Fact]
    public void CompareTo_NumbersThatDifferInTheSecondPart_SeesIt()
    {
        var one = DoubleDouble.One;
        var more = one + 1e-25;

        Assert.True(more > one && one < more && more >= one && one <= more && more != one && one == 1.0);
        Assert.Equal(0, more.CompareTo(one + 1e-25));
        Assert.Equal(2, more.TimesPowerOfTwo(1).High);
    }

    internal static BigFloat Exact(DoubleDouble value) => (BigFloat)value.High + value.Low;

    /// <summary>A positive number of two full parts within 1e-8 and 1e8.</summary>
    internal static DoubleDouble Number(Random random)
    {
        var high = Math.Exp((random.NextDouble() - 0.5) * 36);
        return DoubleDouble.Of(high, high * (random.NextDouble() - 0.5) * 1.1e-16);
    }

    private static void Check(
        double units,
        Func<DoubleDouble, DoubleDouble, DoubleDouble> operation,
        Func<BigFloat, BigFloat, BigFloat> truth,
        Func<DoubleDouble, BigFloat>? second = null,
        Func<BigFloat, BigFloat, BigFloat>? scale = null)
    {
        Assert.True(units * DoubleDouble.Unit <= DoubleDouble.Epsilon);
        var random = new Random(3);
        for (var i = 0; i < Count; i++)
        {
            var (a, b) = (Number(random), Number(random));
            var (x, y) = (Exact(a), second is null ? Exact(b) : second(b));
            var result = operation(a, b);
            var error = (Exact(result) - truth(x, y)).Abs / (scale ?? truth)(x, y);
            Assert.InRange(error.ToDouble(), 0, units * DoubleDouble.Unit);
            Assert.Equal(result.High, result.High + result.Low);
        }
    }
}
