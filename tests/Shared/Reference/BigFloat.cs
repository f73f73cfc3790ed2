using System.Globalization;
using System.Numerics;

namespace ChainSolve.Tests.Shared.Reference;

/// <summary>
/// A floating-point number of 256 bits with an unbounded exponent, made of <see cref="BigInteger"/> arithmetic: slow, simple,
/// and sharing nothing with what it checks. Results are cut, not rounded: each operation errs by at most 2⁻²⁵⁵ relative.
/// </summary>
internal readonly struct BigFloat : IComparable<BigFloat>
{
    private const int Precision = 256;

    private readonly BigInteger mantissa;
    private readonly long exponent;

    private BigFloat(BigInteger mantissa, long exponent)
    {
        this.mantissa = mantissa;
        this.exponent = exponent;
    }

    public static BigFloat Zero => default;

    public static BigFloat One => new(BigInteger.One, 0);

    public bool IsZero => mantissa.IsZero;

    public int Sign => mantissa.Sign;

    public BigFloat Abs => new(BigInteger.Abs(mantissa), exponent);

    public static implicit operator BigFloat(double value)
    {
        if (!double.IsFinite(value))
        {
            throw new ArgumentOutOfRangeException(nameof(value), value, "Only finite numbers can be exact.");
        }

        var (integer, shift) = Split(value);
        return Cut(integer, shift);
    }

    public static BigFloat operator +(BigFloat a, BigFloat b)
    {
        if (a.IsZero)
        {
            return b;
        }

        if (b.IsZero)
        {
            return a;
        }

        if (a.exponent < b.exponent)
        {
            (a, b) = (b, a);
        }

        var gap = a.exponent - b.exponent;
        if (gap > 2 * Precision)
        {
            return a;
        }

        return Cut((a.mantissa << (int)gap) + b.mantissa, b.exponent);
    }

    public static BigFloat operator -(BigFloat a, BigFloat b) => a + new BigFloat(-b.mantissa, b.exponent);

    public static BigFloat operator *(BigFloat a, BigFloat b) => a.IsZero || b.IsZero ? Zero : Cut(a.mantissa * b.mantissa, a.exponent + b.exponent);

    public static BigFloat operator /(BigFloat a, BigFloat b) => Ratio(a.mantissa, b.mantissa, a.exponent - b.exponent);

    public static bool operator <(BigFloat a, BigFloat b) => a.CompareTo(b) < 0;

    public static bool operator >(BigFloat a, BigFloat b) => a.CompareTo(b) > 0;

    public static bool operator <=(BigFloat a, BigFloat b) => a.CompareTo(b) <= 0;

    public static bool operator >=(BigFloat a, BigFloat b) => a.CompareTo(b) >= 0;

    /// <summary>The quotient of two whole numbers times a power of two.</summary>
    public static BigFloat Ratio(BigInteger numerator, BigInteger denominator, long shift = 0)
    {
        if (denominator.IsZero)
        {
            throw new DivideByZeroException();
        }

        var extra = Math.Max(0, Precision + 8 + BitLength(denominator) - BitLength(numerator));
        return Cut((numerator << (int)extra) / denominator, shift - extra);
    }

    /// <summary>The whole number m and the power e with value = m·2ᵉ.</summary>
    public static (BigInteger Integer, int Shift) Split(double value)
    {
        var bits = BitConverter.DoubleToInt64Bits(value);
        var field = (int)((bits >> 52) & 0x7FF);
        var fraction = bits & 0xFFFFFFFFFFFFFL;
        var integer = field == 0 ? fraction : fraction | (1L << 52);
        return (bits < 0 ? -integer : integer, Math.Max(field, 1) - 1075);
    }

    /// <summary>Reads a decimal number such as <c>9.95e-25</c>.</summary>
    public static BigFloat Parse(string text)
    {
        var at = text.IndexOfAny(['e', 'E']);
        var power = at < 0 ? 0 : int.Parse(text.AsSpan(at + 1), NumberStyles.AllowLeadingSign, CultureInfo.InvariantCulture);
        var digits = at < 0 ? text : text[..at];
        var dot = digits.IndexOf('.', StringComparison.Ordinal);
        if (dot >= 0)
        {
            power -= digits.Length - dot - 1;
            digits = digits.Remove(dot, 1);
        }

        var integer = BigInteger.Parse(digits, NumberStyles.AllowLeadingSign, CultureInfo.InvariantCulture);
        return power < 0 ? Ratio(integer, BigInteger.Pow(10, -power)) : Cut(integer * BigInteger.Pow(10, power), 0);
    }

    /// <summary>e to a power between -1 and 1, by its series.</summary>
    public static BigFloat ExpOfSmall(BigFloat power)
    {
        if (power.Abs > One)
        {
            throw new ArgumentOutOfRangeException(nameof(power), "The series is meant for small powers.");
        }

        var sum = One;
        var term = One;
        for (var k = 1; k < 80; k++)
        {
            term = term * power / k;
            sum += term;
        }

        return sum;
    }

    public BigFloat TimesPowerOfTwo(long power) => new(mantissa, exponent + power);

    /// <summary>The exponent of the leading bit: the value lies in [2ᵏ, 2ᵏ⁺¹).</summary>
    public long LeadingPower => exponent + BitLength(mantissa) - 1;

    public double ToDouble()
    {
        if (IsZero)
        {
            return 0;
        }

        var cut = (int)Math.Max(0, BitLength(mantissa) - 60);
        return Math.ScaleB((double)(long)(mantissa >> cut), (int)Math.Clamp(exponent + cut, -5000, 5000));
    }

    public int CompareTo(BigFloat other) => (this - other).Sign;

    public override string ToString() => ToDouble().ToString("R", CultureInfo.InvariantCulture);

    private static long BitLength(BigInteger value) => (long)BigInteger.Abs(value).GetBitLength();

    private static BigFloat Cut(BigInteger mantissa, long exponent)
    {
        if (mantissa.IsZero)
        {
            return Zero;
        }

        var excess = (int)(BitLength(mantissa) - Precision);
        return excess <= 0 ? new BigFloat(mantissa, exponent) : new BigFloat(mantissa >> excess, exponent + excess);
    }
}
