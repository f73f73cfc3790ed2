namespace ChainSolve.Expressions;

/// <summary>The functions of the notation that the framework lacks in this form.</summary>
internal static class ScalarMath
{
    /// <summary>The quotient; NaN where the divisor is zero.</summary>
    public static double Divide(double x, double y) => y == 0 ? double.NaN : x / y;

    /// <summary>Rounds to the nearest whole number, halves away from zero.</summary>
    public static double Round(double x) => Math.Round(x, MidpointRounding.AwayFromZero);

    /// <summary>
    /// The number of ways to choose k of n: exact as long as it and its steps are below 2^53; 0 for k below 0 or above n; NaN where n is
    /// negative or one of them is not a whole number.
    /// </summary>
    public static double Choose(double n, double k)
    {
        if (!(n >= 0) || n != Math.Floor(n) || k != Math.Floor(k) || double.IsInfinity(n))
        {
            return double.NaN;
        }

        if (k < 0 || k > n)
        {
            return 0;
        }

        k = Math.Min(k, n - k);
        var ways = 1.0;
        for (var i = 1.0; i <= k && double.IsFinite(ways); i++)
        {
            ways = ways * (n - k + i) / i;
        }

        return ways;
    }
}
