namespace ChainSolve.Numerics.Krylov;

/// <summary>The exponential of a small dense matrix, by scaling, its series, and squaring. Safe to share between threads.</summary>
internal static class SmallExponential
{
    private const int Terms = 16;

    /// <summary>How often a matrix has to be halved until the series is good to the last digit.</summary>
    public static int Halvings(double[,] matrix)
    {
        var n = matrix.GetLength(0);
        var norm = 0.0;
        for (var i = 0; i < n; i++)
        {
            var row = 0.0;
            for (var j = 0; j < n; j++)
            {
                row += Math.Abs(matrix[i, j]);
            }

            norm = Math.Max(norm, row);
        }

        return norm > 0.25 ? (int)Math.Ceiling(Math.Log2(norm)) + 2 : 0;
    }

    /// <summary>exp(matrix); a new array.</summary>
    public static double[,] Of(double[,] matrix)
    {
        var n = matrix.GetLength(0);
        var halvings = Halvings(matrix);
        var result = Identity(n);
        for (var term = Terms; term >= 1; term--)
        {
            result = Times(matrix, result, Math.ScaleB(1.0, -halvings) / term);
            for (var i = 0; i < n; i++)
            {
                result[i, i] += 1;
            }
        }

        for (var h = 0; h < halvings; h++)
        {
            result = Times(result, result, 1);
        }

        return result;
    }

    /// <summary>A product, times a factor; a new array.</summary>
    public static double[,] Times(double[,] a, double[,] b, double factor)
    {
        var n = a.GetLength(0);
        var result = new double[n, n];
        for (var i = 0; i < n; i++)
        {
            for (var k = 0; k < n; k++)
            {
                var left = a[i, k] * factor;
                for (var j = 0; j < n && left != 0; j++)
                {
                    result[i, j] += left * b[k, j];
                }
            }
        }

        return result;
    }

    private static double[,] Identity(int n)
    {
        var result = new double[n, n];
        for (var i = 0; i < n; i++)
        {
            result[i, i] = 1;
        }

        return result;
    }
}
