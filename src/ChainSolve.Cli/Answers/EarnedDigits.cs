using System.Globalization;

namespace ChainSolve.Cli.Answers;

/// <summary>Prints a number with the digits that its error bound earns.</summary>
internal static class EarnedDigits
{
    /// <summary>What a double can hold.</summary>
    private const int MostDigits = 15;

    /// <summary>The number, invariant culture; digits that the bound makes doubtful are left out, but one always stays.</summary>
    /// <param name="value">The number; may be infinite.</param>
    /// <param name="bound">The absolute error bound; not negative.</param>
    /// <param name="most">The most significant digits to print.</param>
    public static string Format(double value, double bound, int most = MostDigits)
    {
        if (value == 0 || double.IsInfinity(value))
        {
            return value.ToString(CultureInfo.InvariantCulture);
        }

        // The last digit shown stands for at least twice the bound.
        var first = Math.Floor(Math.Log10(Math.Abs(value)));
        var sure = bound > 0 ? first - Math.Ceiling(Math.Log10(2 * bound)) + 1 : most;
        var digits = (int)Math.Clamp(sure, 1, Math.Min(most, MostDigits));
        return value.ToString("G" + digits.ToString(CultureInfo.InvariantCulture), CultureInfo.InvariantCulture).Replace("E", "e", StringComparison.Ordinal);
    }
}
