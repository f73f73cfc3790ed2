namespace ChainSolve.Numerics.Arithmetic;

/// <summary>
/// A sum carried in two doubles. For terms of one sign its value is off by less than <see cref="Rounding"/>, relative,
/// whatever the number of terms, as long as no term is below 1e-290.
/// </summary>
internal struct LongSum
{
    /// <summary>The relative error of a sum of terms of one sign.</summary>
    public const double Rounding = 1.2e-16;

    private double high;
    private double low;

    /// <summary>The sum so far.</summary>
    public readonly double Value => double.IsFinite(low) ? high + low : high;

    /// <summary>A sum of two parts.</summary>
    public static LongSum Of(double high, double low) => new() { high = high, low = low };

    /// <summary>The sum of products of two vectors.</summary>
    public static double Dot(double[] a, double[] b)
    {
        LongSum sum = default;
        for (var i = 0; i < a.Length; i++)
        {
            sum.AddProduct(a[i], b[i]);
        }

        return sum.Value;
    }

    /// <summary>The sum of a vector.</summary>
    public static double Of(double[] a)
    {
        LongSum sum = default;
        foreach (var x in a)
        {
            sum.Add(x);
        }

        return sum.Value;
    }

    public void Add(double term)
    {
        var sum = high + term;
        var part = sum - high;
        low += high - (sum - part) + (term - part);
        high = sum;
    }

    /// <summary>Adds another sum.</summary>
    public void Add(LongSum other)
    {
        low += other.low;
        Add(other.high);
    }

    /// <summary>Adds a product with its own rounding error; a factor of 0 adds nothing, whatever the other is.</summary>
    public void AddProduct(double a, double b)
    {
        if (a == 0 || b == 0)
        {
            return;
        }

        var product = a * b;
        low += Math.FusedMultiplyAdd(a, b, -product);
        Add(product);
    }
}
