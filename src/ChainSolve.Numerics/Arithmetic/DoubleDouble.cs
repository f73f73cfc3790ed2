namespace ChainSolve.Numerics.Arithmetic;

/// <summary>
/// A number as the unevaluated sum of two doubles of which the second is at most half a unit in the last place of the
/// first: about 32 digits within the range of a double.
/// </summary>
/// <remarks>
/// The operations are those that Joldes, Muller and Popescu (ACM TOMS 44 (2017)) analyse; the error bounds are quoted
/// from memory. With u = 2⁻⁵³, and away from underflow, the relative errors are at most: sum of two 3u² for equal signs,
/// sum with a double 2u², product 5u², product with a double 2u², quotient 15u². All lie below <see cref="Epsilon"/>.
/// </remarks>
internal readonly struct DoubleDouble : IComparable<DoubleDouble>, IEquatable<DoubleDouble>
{
    /// <summary>A relative error that no single operation on numbers of equal sign exceeds: 16 units of 2⁻¹⁰⁶.</summary>
    public const double Epsilon = Unit * 16;

    /// <summary>The square of half the spacing of doubles at one, 2⁻¹⁰⁶.</summary>
    public const double Unit = 1.0 / (1L << 53) / (1L << 53);

    private DoubleDouble(double high, double low)
    {
        High = high;
        Low = low;
    }

    public static DoubleDouble Zero => default;

    public static DoubleDouble One => new(1, 0);

    /// <summary>The nearest double.</summary>
    public double High { get; }

    /// <summary>What the nearest double leaves over.</summary>
    public double Low { get; }

    public static implicit operator DoubleDouble(double value) => new(value, 0);

    public static DoubleDouble operator +(DoubleDouble a, DoubleDouble b)
    {
        var (sum, rest) = TwoSum(a.High, b.High);
        var (low, lowRest) = TwoSum(a.Low, b.Low);
        var (high, part) = FastTwoSum(sum, rest + low);
        return Of(high, lowRest + part);
    }

    public static DoubleDouble operator +(DoubleDouble a, double b)
    {
        var (sum, rest) = TwoSum(a.High, b);
        return Of(sum, rest + a.Low);
    }

    public static DoubleDouble operator -(DoubleDouble a, DoubleDouble b) => a + new DoubleDouble(-b.High, -b.Low);

    public static DoubleDouble operator *(DoubleDouble a, DoubleDouble b)
    {
        var (product, rest) = TwoProduct(a.High, b.High);
        return Of(product, Math.FusedMultiplyAdd(a.Low, b.High, Math.FusedMultiplyAdd(a.High, b.Low, rest)));
    }

    public static DoubleDouble operator *(DoubleDouble a, double b)
    {
        var (product, rest) = TwoProduct(a.High, b);
        return Of(product, Math.FusedMultiplyAdd(a.Low, b, rest));
    }

    public static DoubleDouble operator /(DoubleDouble a, DoubleDouble b)
    {
        var first = a.High / b.High;
        var remainder = Math.FusedMultiplyAdd(-first, b.High, a.High);
        remainder = Math.FusedMultiplyAdd(-first, b.Low, remainder) + a.Low;
        return Of(first, remainder / b.High);
    }

    public static bool operator <(DoubleDouble a, DoubleDouble b) => a.CompareTo(b) < 0;

    public static bool operator >(DoubleDouble a, DoubleDouble b) => a.CompareTo(b) > 0;

    public static bool operator <=(DoubleDouble a, DoubleDouble b) => a.CompareTo(b) <= 0;

    public static bool operator >=(DoubleDouble a, DoubleDouble b) => a.CompareTo(b) >= 0;

    public static bool operator ==(DoubleDouble a, DoubleDouble b) => a.Equals(b);

    public static bool operator !=(DoubleDouble a, DoubleDouble b) => !a.Equals(b);

    /// <summary>Two parts of which the second is no larger than the first, brought into the form of this type.</summary>
    public static DoubleDouble Of(double high, double low)
    {
        var (sum, rest) = FastTwoSum(high, low);
        return new DoubleDouble(sum, rest);
    }

    /// <summary>The exact sum of two doubles.</summary>
    public static DoubleDouble Sum(double a, double b)
    {
        var (sum, rest) = TwoSum(a, b);
        return new DoubleDouble(sum, rest);
    }

    /// <summary>The product of two doubles, exact where its second part does not underflow.</summary>
    public static DoubleDouble Product(double a, double b)
    {
        var (product, rest) = TwoProduct(a, b);
        return new DoubleDouble(product, rest);
    }

    /// <summary>The number times a power of two, exact where it does not underflow.</summary>
    public DoubleDouble TimesPowerOfTwo(int power) => new(Math.ScaleB(High, power), Math.ScaleB(Low, power));

    public int CompareTo(DoubleDouble other)
    {
        var byHigh = High.CompareTo(other.High);
        return byHigh != 0 ? byHigh : Low.CompareTo(other.Low);
    }

    public bool Equals(DoubleDouble other) => High.Equals(other.High) && Low.Equals(other.Low);

    public override bool Equals(object? obj) => obj is DoubleDouble other && Equals(other);

    public override int GetHashCode() => HashCode.Combine(High, Low);

    private static (double Sum, double Error) TwoSum(double a, double b)
    {
        var sum = a + b;
        var part = sum - a;
        return (sum, (a - (sum - part)) + (b - part));
    }

    private static (double Sum, double Error) FastTwoSum(double large, double small)
    {
        var sum = large + small;
        return (sum, small - (sum - large));
    }

    private static (double Product, double Error) TwoProduct(double a, double b)
    {
        var product = a * b;
        return (product, Math.FusedMultiplyAdd(a, b, -product));
    }
}
