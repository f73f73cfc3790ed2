namespace ChainSolve.Numerics.Krylov;

/// <summary>How far a distribution can be followed in a subspace, and where it is. Reads the basis; not safe to share between threads.</summary>
internal sealed class SubspaceReach
{
    // The samples miss what lies between them.
    private const double Safety = 2;

    private readonly double[,] matrix;
    private readonly double rate;
    private readonly double beyond;
    private readonly int count;

    /// <summary>Looks at a basis of the step I + Q/q.</summary>
    /// <param name="basis">The basis.</param>
    /// <param name="rate">The rate q.</param>
    public SubspaceReach(KrylovBasis basis, double rate)
    {
        // Bordered by a multiple of the first unit vector, as large as the rest, the exponential has as many integrals of itself in its last column.
        this.rate = rate;
        count = basis.Count;
        matrix = new double[count + 1, count + 1];
        for (var i = 0; i < count; i++)
        {
            for (var j = 0; j < count; j++)
            {
                matrix[i, j] = rate * (basis.Matrix[i, j] - (i == j ? 1 : 0));
            }
        }

        matrix[0, count] = rate;
        beyond = basis.Beyond == 0 ? 0 : Safety * basis.Length * rate * basis.Beyond * LaneVectors.OneNorm(basis[count]);
    }

    /// <summary>How far the error is allowed, by halves of a time: the time and the error.</summary>
    /// <param name="most">The longest time that is wanted.</param>
    /// <param name="allowed">The error allowed at a time.</param>
    public (double Length, double Error) Find(double most, Func<double, double> allowed)
    {
        // From a time so short that the series gives the exponential, doubling: the defect is seen at every scale.
        var halvings = SmallExponential.Halvings(Scaled(most));
        var exponential = SmallExponential.Of(Scaled(Math.ScaleB(most, -halvings)));
        var (before, sum, length) = (0.0, 0.0, Math.ScaleB(most, -halvings));
        var (defectBefore, best) = (count == 1 ? 1.0 : 0.0, (Length: 0.0, Error: 0.0));
        for (var h = 0; h <= halvings; h++)
        {
            var defect = Math.Abs(exponential[count - 1, 0]);
            sum += Math.Max(defect, defectBefore) * (length - before);
            var error = beyond * sum;
            if (best.Length > 0 && !(error <= allowed(length)))
            {
                break;
            }

            best = (length, error);
            (before, defectBefore, length) = (length, defect, Math.ScaleB(most, h + 1 - halvings));
            exponential = h < halvings ? SmallExponential.Times(exponential, exponential, 1) : exponential;
        }

        return best;
    }

    /// <summary>What the vectors of the basis count for after a time, and in the integral up to it.</summary>
    public (double[] At, double[] UpTo) At(double length)
    {
        var exponential = SmallExponential.Of(Scaled(length));
        var (at, upTo) = (new double[count], new double[count]);
        for (var i = 0; i < count; i++)
        {
            (at[i], upTo[i]) = (exponential[i, 0], exponential[i, count] / rate);
        }

        return (at, upTo);
    }

    private double[,] Scaled(double factor)
    {
        var result = new double[count + 1, count + 1];
        for (var i = 0; i <= count; i++)
        {
            for (var j = 0; j <= count; j++)
            {
                result[i, j] = matrix[i, j] * factor;
            }
        }

        return result;
    }
}
