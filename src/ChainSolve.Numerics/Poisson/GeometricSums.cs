using ChainSolve.Numerics.Arithmetic;

namespace ChainSolve.Numerics.Poisson;

/// <summary>
/// What a vector counts for at a time, and up to it, that from some step on changes by a known factor a step; or that is fed anew at every step
/// in an amount that itself changes by a known factor; and so on, one factor for each stage.
/// </summary>
/// <remarks>
/// With B the matrix that has the factors on its diagonal and ones above it, and N the Poisson number of steps, this is the upper right entry of the
/// expected value of B^(N - k) over N ≥ k; one more factor of one makes totals of it. Where next to all of N lies beyond k, it is
/// that of exp(mean (B - I)) B^(-k), by scaling and squaring; elsewhere it is summed over the weights from their end. Both are done in two doubles. Not safe to share between
/// threads.
/// </remarks>
internal sealed class GeometricSums
{
    private const double Rounding = 1.2e-16;

    // exp(-700) is below any probability of interest.
    private const double Depth = 700;

    // Terms of the series of a short step.
    private const int Terms = 22;

    private readonly DoubleDouble mean;
    private readonly DoubleDouble[] factors;
    private readonly double[] drifts;
    private readonly Func<PoissonWindow> window;
    private readonly double smallest;
    private readonly double last;
    private DoubleDouble[]? row;
    private long rowStep;
    private long tableStart;
    private (double AtTime, double UpToTime)[] table = [];

    /// <summary>Prepares the sums; hardly anything is computed yet.</summary>
    /// <param name="mean">The mean of N.</param>
    /// <param name="drifts">What each factor is above one; above -1, and not above what rounding may be.</param>
    /// <param name="window">The weights of N; asked only where they matter.</param>
    public GeometricSums(DoubleDouble mean, IEnumerable<double> drifts, Func<PoissonWindow> window)
    {
        this.mean = mean;
        this.window = window;

        // The order does not matter to the result; small factors first, no difference of like numbers is divided by a small one.
        this.drifts = [.. drifts.Order(), 0];
        factors = [.. this.drifts.Select(d => DoubleDouble.Sum(1, d))];
        smallest = Math.Min(1, factors[0].High);
        last = FirstStep(mean.High * smallest);
    }

    /// <summary>The first step at which a Poisson number of a mean can have weight: what lies below has less than exp(-700) together.</summary>
    /// <remarks>Chernoff: P(N ≤ k) ≤ exp(-(mean - k)²/(2 mean)) for k below the mean.</remarks>
    public static double FirstStep(double mean) => mean - Math.Sqrt(2 * Depth * mean);

    /// <summary>The weights of a vector that settled, or was fed, after k steps.</summary>
    public SettledWeight After(long k)
    {
        // A stage takes a step.
        k -= factors.Length - 2;
        return k < last ? Closed(k) : Summed(k);
    }

    private SettledWeight Closed(long k)
    {
        row ??= Start();
        if (k != rowStep)
        {
            row = k == rowStep + 1 ? Before(row) : Jump(Start(), k);
            rowStep = k;
        }

        // Squaring doubles the error, as often as it doubles the time; powers of the inverse have both signs.
        var inverse = k / smallest;
        var signs = Math.Pow((mean.High + inverse) / (mean.High - inverse), factors.Length - 1);
        var units = factors.Length * (((mean.High + 1) * 160) + ((k + 1) * 40 * signs));
        var error = Rounding + (units * DoubleDouble.Unit);
        return new SettledWeight(row[^2].High, row[^1].High, error, error);
    }

    /// <summary>The first row of exp(mean (B - I)).</summary>
    private DoubleDouble[] Start()
    {
        var n = factors.Length;
        var halvings = Math.Max(0, (int)Math.Ceiling(Math.Log2(mean.High)) + 3);
        var step = mean.TimesPowerOfTwo(-halvings);

        // By Horner's rule: I + step (B - I) (I + step (B - I)/2 (I + ...)).
        var matrix = Identity(n);
        for (var term = Terms; term >= 1; term--)
        {
            var next = Identity(n);
            for (var i = 0; i < n; i++)
            {
                for (var j = i; j < n; j++)
                {
                    var moved = (matrix[i][j] * drifts[i]) + (i + 1 < n ? matrix[i + 1][j] : 0);
                    next[i][j] += moved * step / term;
                }
            }

            matrix = next;
        }

        for (var h = 0; h < halvings; h++)
        {
            matrix = Times(matrix, matrix);
        }

        rowStep = 0;
        return matrix[0];
    }

    /// <summary>A row times B^(-k).</summary>
    private DoubleDouble[] Jump(DoubleDouble[] from, long k)
    {
        var n = factors.Length;
        var power = new DoubleDouble[n][];
        for (var i = 0; i < n; i++)
        {
            power[i] = new DoubleDouble[n];
            power[i][i] = 1;
            power[i] = Before(power[i]);
        }

        for (; k > 0; k >>= 1)
        {
            from = (k & 1) == 1 ? Times([from], power)[0] : from;
            power = Times(power, power);
        }

        return from;
    }

    /// <summary>A row times the inverse of B.</summary>
    private DoubleDouble[] Before(DoubleDouble[] from)
    {
        var result = new DoubleDouble[from.Length];
        for (var j = 0; j < from.Length; j++)
        {
            result[j] = (from[j] - (j > 0 ? result[j - 1] : 0)) / factors[j];
        }

        return result;
    }

    private static DoubleDouble[][] Identity(int n)
    {
        var result = new DoubleDouble[n][];
        for (var i = 0; i < n; i++)
        {
            result[i] = new DoubleDouble[n];
            result[i][i] = 1;
        }

        return result;
    }

    private static DoubleDouble[][] Times(DoubleDouble[][] a, DoubleDouble[][] b)
    {
        var result = new DoubleDouble[a.Length][];
        for (var i = 0; i < a.Length; i++)
        {
            result[i] = new DoubleDouble[b.Length];
            for (var k = 0; k < b.Length; k++)
            {
                for (var j = k; j < b.Length && a[i][k].High != 0; j++)
                {
                    result[i][j] += a[i][k] * b[k][j];
                }
            }
        }

        return result;
    }

    private SettledWeight Summed(long k)
    {
        if (table.Length == 0 || k < tableStart)
        {
            Fill(window(), k);
        }

        var (atTime, upToTime) = k - tableStart < table.Length ? table[k - tableStart] : default;
        return new SettledWeight(atTime, upToTime, Rounding, Rounding);
    }

    private void Fill(PoissonWindow weights, long first)
    {
        tableStart = first;
        table = new (double, double)[Math.Max(1, weights.Right - first + 1)];
        var sums = new DoubleDouble[factors.Length];
        for (var i = table.Length - 1; i >= 0; i--)
        {
            for (var j = sums.Length - 1; j >= 0; j--)
            {
                sums[j] = (sums[j] * factors[j]) + (j > 0 ? sums[j - 1] : weights.Weight(first + i));
            }

            table[i] = (sums[^2].High, sums[^1].High);
        }
    }
}

/// <summary>What a settled vector counts for.</summary>
/// <param name="AtTime">For a value at the time.</param>
/// <param name="UpToTime">For a total up to the time, in steps.</param>
/// <param name="Error">A bound on the relative error of the first.</param>
/// <param name="UpToError">The same for the second.</param>
internal readonly record struct SettledWeight(double AtTime, double UpToTime, double Error, double UpToError);
