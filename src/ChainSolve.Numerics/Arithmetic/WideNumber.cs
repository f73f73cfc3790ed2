using System.Runtime.InteropServices;

namespace ChainSolve.Numerics.Arithmetic;

/// <summary>
/// A non-negative number as an unevaluated sum of two doubles with an exponent of its own: about 31 digits, and a range
/// that products of thousands of tiny rates do not leave. Only sums, products and ratios: they lose no digits.
/// </summary>
/// <remarks>
/// The operations are the error-free transformations of Dekker and Knuth; each result is off by less than
/// <see cref="Epsilon"/>, relative (Joldes, Muller and Popescu, ACM TOMS 44 (2017), give 3 to 15 units of 2⁻¹⁰⁶; from memory).
/// </remarks>
[StructLayout(LayoutKind.Sequential, Pack = 4)]
internal readonly struct WideNumber
{
    /// <summary>The largest relative error of one operation.</summary>
    public const double Epsilon = 1.0 / (1L << 51) / (1L << 51);

    // The leading part stays within 2^±256, so that no partial product comes near the ends of the range of a double.
    private const int Step = 512;
    private static readonly double High = Math.ScaleB(1, Step / 2);
    private static readonly double Low = Math.ScaleB(1, -Step / 2);
    private static readonly double Up = Math.ScaleB(1, Step);
    private static readonly double Down = Math.ScaleB(1, -Step);

    private readonly double high;
    private readonly double low;
    private readonly int exponent;

    private WideNumber(double high, double low, int exponent)
    {
        this.high = high;
        this.low = low;
        this.exponent = exponent;
    }

    public static WideNumber Zero => default;

    public static WideNumber One => new(1, 0, 0);

    public bool IsZero => high == 0;

    public static implicit operator WideNumber(double value)
    {
        // A subnormal is brought into range before it is used.
        return Math.Abs(value) < Low && value != 0 ? Ranged(value * Up, 0, -1) : Ranged(value, 0, 0);
    }

    public static WideNumber operator +(WideNumber a, WideNumber b)
    {
        if (a.exponent != b.exponent)
        {
            return AddApart(a, b);
        }

        var sum = a.high + b.high;
        var part = sum - a.high;
        var rest = a.high - (sum - part) + (b.high - part) + (a.low + b.low);
        var high = sum + rest;
        return Ranged(high, rest - (high - sum), a.exponent);
    }

    public static WideNumber operator *(WideNumber a, WideNumber b)
    {
        var product = a.high * b.high;
        var rest = Math.FusedMultiplyAdd(a.high, b.high, -product);
        rest += Math.FusedMultiplyAdd(a.high, b.low, a.low * b.high);
        var high = product + rest;
        return Ranged(high, rest - (high - product), a.exponent + b.exponent);
    }

    public static WideNumber operator /(WideNumber a, WideNumber b)
    {
        var first = a.high / b.high;
        var product = first * b.high;
        var rest = Math.FusedMultiplyAdd(first, b.high, -product) + (first * b.low);
        var second = (a.high - product - rest + a.low) / b.high;
        var high = first + second;
        return Ranged(high, second - (high - first), a.exponent - b.exponent);
    }

    public static bool operator <(WideNumber a, WideNumber b) => a.CompareTo(b) < 0;

    public static bool operator >(WideNumber a, WideNumber b) => a.CompareTo(b) > 0;

    /// <summary>The nearest double; infinite above its range, and at least the smallest double unless it is zero.</summary>
    public double ToDouble()
    {
        if (exponent == 0)
        {
            return high + low;
        }

        var value = Math.ScaleB(high + low, (int)Math.Clamp((long)exponent * Step, -5000, 5000));
        return value == 0 && high > 0 ? double.Epsilon : value;
    }

    /// <summary>What <see cref="ToDouble"/> leaves over, as a sign and an amount.</summary>
    public (int Sign, double Amount) Rest()
    {
        var rest = Math.ScaleB(low, (int)Math.Clamp((long)exponent * Step, -5000, 5000));
        return (Math.Sign(rest), Math.Abs(rest));
    }

    /// <summary>How far the number is from 1, as far as two doubles tell.</summary>
    public double DistanceFromOne() => exponent == 0 ? Math.Abs(high - 1 + low) : double.PositiveInfinity;

    private int CompareTo(WideNumber other)
    {
        if (IsZero || other.IsZero || exponent == other.exponent)
        {
            var byHigh = high.CompareTo(other.high);
            return byHigh != 0 ? byHigh : low.CompareTo(other.low);
        }

        if (Math.Abs(exponent - other.exponent) > 1)
        {
            return exponent.CompareTo(other.exponent);
        }

        return exponent > other.exponent ? high.CompareTo(other.high * Down) : (high * Down).CompareTo(other.high);
    }

    private static WideNumber AddApart(WideNumber a, WideNumber b)
    {
        if (a.IsZero)
        {
            return b;
        }

        if (b.IsZero)
        {
            return a;
        }

        var (large, small) = a.exponent > b.exponent ? (a, b) : (b, a);

        // Two steps apart the smaller is below the last bit of the larger.
        return large.exponent - small.exponent > 1
            ? large
            : large + new WideNumber(small.high * Down, small.low * Down, large.exponent);
    }

    private static WideNumber Ranged(double high, double low, int exponent)
    {
        if (high < High && high >= Low)
        {
            return new WideNumber(high, low, exponent);
        }

        if (high == 0)
        {
            return default;
        }

        return high < Low ? Ranged(high * Up, low * Up, exponent - 1) : Ranged(high * Down, low * Down, exponent + 1);
    }
}
