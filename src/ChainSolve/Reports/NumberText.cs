using System.Globalization;

namespace ChainSolve.Reports;

/// <summary>How reports write numbers: the same in every culture.</summary>
internal static class NumberText
{
    /// <summary>What a double can hold.</summary>
    private const int MostDigits = 15;

    // Sizes that are written without an exponent.
    private const int LeastPower = -4;
    private const int MostPower = 9;

    /// <summary>All digits that tell the number from its neighbours.</summary>
    public static string Full(double value) => Tidy(value.ToString("R", CultureInfo.InvariantCulture));

    /// <summary>A number that people wrote, such as a time, without the noise of its last digits.</summary>
    public static string Written(double value) => Plain(value, 12);

    /// <summary>A time with the model's unit.</summary>
    public static string Time(double time, Model model) => model.TimeUnit.Length == 0 ? Written(time) : $"{Written(time)} {model.TimeUnit}";

    /// <summary>A count.</summary>
    public static string Count(long value) => value.ToString("N0", CultureInfo.InvariantCulture);

    /// <summary>The digits that the error bound earns; at least one, and no more than wanted.</summary>
    public static string Earned(double value, double bound, int most = MostDigits)
    {
        if (double.IsPositiveInfinity(value))
        {
            return "infinite";
        }

        if (double.IsNegativeInfinity(value))
        {
            return "-infinite";
        }

        return value == 0 ? "0" : Plain(value, Math.Min(most, EarnedDigits(value, bound)));
    }

    /// <summary>An error bound, rounded up to two digits.</summary>
    public static string Bound(double bound)
    {
        if (bound < 1e-300)
        {
            return bound == 0 ? "0" : "1e-300";
        }

        // A part in a million makes up for the rounding of the scaling itself.
        var power = Math.Floor(Math.Log10(bound));
        var scaled = Math.Ceiling((bound / Math.Pow(10, power - 1)) * (1 - 1e-6));
        return Plain(scaled * Math.Pow(10, power - 1), 2);
    }

    /// <summary>The time that a call took.</summary>
    public static string Seconds(TimeSpan elapsed) =>
        elapsed.TotalSeconds.ToString(elapsed.TotalSeconds < 10 ? "0.000" : "0.0", CultureInfo.InvariantCulture) + " s";

    private static int EarnedDigits(double value, double bound)
    {
        if (!(bound > 0))
        {
            return MostDigits;
        }

        // The last digit shown stands for at least twice the bound.
        var digits = Math.Floor(Math.Log10(Math.Abs(value))) - Math.Ceiling(Math.Log10(2 * bound)) + 1;
        return (int)Math.Clamp(digits, 1, MostDigits);
    }

    private static string Plain(double value, int digits)
    {
        if (value == 0)
        {
            return "0";
        }

        var scientific = value.ToString("e" + (digits - 1).ToString(CultureInfo.InvariantCulture), CultureInfo.InvariantCulture);
        var split = scientific.IndexOf('e', StringComparison.Ordinal);
        var power = int.Parse(scientific.AsSpan(split + 1), NumberStyles.AllowLeadingSign, CultureInfo.InvariantCulture);
        if (power < LeastPower || power >= MostPower || power >= digits)
        {
            return Mantissa(scientific[..split]) + "e" + power.ToString(CultureInfo.InvariantCulture);
        }

        return Mantissa(decimal.Parse(scientific, NumberStyles.Float, CultureInfo.InvariantCulture).ToString(CultureInfo.InvariantCulture));
    }

    private static string Mantissa(string digits) =>
        digits.Contains('.', StringComparison.Ordinal) ? digits.TrimEnd('0').TrimEnd('.') : digits;

    private static string Tidy(string text)
    {
        var split = text.IndexOf('E', StringComparison.Ordinal);
        return split < 0 ? text : text[..split] + "e" + int.Parse(text.AsSpan(split + 1), NumberStyles.AllowLeadingSign, CultureInfo.InvariantCulture).ToString(CultureInfo.InvariantCulture);
    }
}
