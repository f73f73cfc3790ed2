using ChainSolve.Numerics.Operators;

namespace ChainSolve.Numerics.Balance;

/// <summary>
/// The balance equations of a chain in relative errors: the unknown d says by what share each weight is too small, with the
/// weight of one state fixed, which makes the equations regular.
/// </summary>
/// <remarks>In these terms small weights count as much as large ones. Not safe to share between threads.</remarks>
internal sealed class FixedStateSystem
{
    private readonly Generator generator;
    private readonly double[] weights;
    private readonly int fixedState;
    private readonly IncompleteFactors factors;
    private readonly double[] scaled;

    public FixedStateSystem(Generator generator, double[] weights, CancellationToken cancellation)
    {
        (this.generator, this.weights, Cancellation) = (generator, weights, cancellation);
        fixedState = Array.IndexOf(weights, weights.Max());
        factors = IncompleteFactors.Of(generator, fixedState, cancellation);
        scaled = new double[weights.Length];
    }

    public CancellationToken Cancellation { get; }

    public int Count => weights.Length;

    /// <summary>By what share more comes into each state than goes out of it at the weights as they are now.</summary>
    public double[] Imbalance()
    {
        var result = new double[Count];
        Array.Fill(result, 1);
        Multiply(result, result);
        for (var j = 0; j < result.Length; j++)
        {
            result[j] = -result[j];
        }

        result[fixedState] = 0;
        return result;
    }

    /// <summary>Multiplies by the matrix of the equations; the result may replace the vector.</summary>
    public void Multiply(double[] v, double[] result)
    {
        Cancellation.ThrowIfCancellationRequested();
        for (var i = 0; i < v.Length; i++)
        {
            scaled[i] = weights[i] * v[i];
        }

        var (offsets, sources, rates, exits) = (generator.Columns.Offsets, generator.Columns.Targets, generator.Columns.Values, generator.ExitRates);
        for (var j = 0; j < v.Length; j++)
        {
            var sum = 0.0;
            var end = (int)offsets[j + 1];
            for (var e = (int)offsets[j]; e < end; e++)
            {
                sum += rates[e] * scaled[sources[e]];
            }

            result[j] = j == fixedState ? v[j] : v[j] - (sum / exits[j] / weights[j]);
        }
    }

    /// <summary>Solves approximately with the incomplete factors.</summary>
    public void Precondition(double[] v, double[] result)
    {
        Cancellation.ThrowIfCancellationRequested();
        for (var i = 0; i < v.Length; i++)
        {
            result[i] = weights[i] * v[i];
        }

        factors.Solve(result);
        for (var i = 0; i < v.Length; i++)
        {
            result[i] /= weights[i];
        }
    }

    public static double Dot(double[] a, double[] b)
    {
        var sum = 0.0;
        for (var i = 0; i < a.Length; i++)
        {
            sum += a[i] * b[i];
        }

        return sum;
    }

    public static double Norm(double[] a) => Math.Sqrt(Dot(a, a));

    /// <summary>y += factor * x.</summary>
    public static void Add(double factor, double[] x, double[] y)
    {
        for (var i = 0; i < x.Length; i++)
        {
            y[i] += factor * x[i];
        }
    }
}
