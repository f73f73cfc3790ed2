using System.Numerics;

namespace ChainSolve.Tests.Shared.Reference;

/// <summary>
/// Linear systems in whole numbers, solved without any rounding by fraction-free Gauss-Jordan elimination
/// (E.H. Bareiss, Math. Comp. 22 (1968) 565-578).
/// </summary>
internal static class ExactSystem
{
    /// <summary>Solves A x = b; x is the numerators over the denominator.</summary>
    /// <param name="matrix">A square matrix whose leading minors are not zero.</param>
    /// <param name="right">The right side.</param>
    public static (BigInteger[] Numerators, BigInteger Denominator) Solve(BigInteger[,] matrix, BigInteger[] right)
    {
        var n = right.Length;
        var a = new BigInteger[n, n + 1];
        for (var i = 0; i < n; i++)
        {
            for (var j = 0; j < n; j++)
            {
                a[i, j] = matrix[i, j];
            }

            a[i, n] = right[i];
        }

        var last = BigInteger.One;
        for (var k = 0; k < n; k++)
        {
            var pivot = a[k, k];
            if (pivot.IsZero)
            {
                throw new InvalidOperationException("The system is singular.");
            }

            for (var i = 0; i < n; i++)
            {
                if (i == k)
                {
                    continue;
                }

                var factor = a[i, k];
                for (var j = k + 1; j <= n; j++)
                {
                    a[i, j] = ((pivot * a[i, j]) - (factor * a[k, j])) / last;
                }

                a[i, k] = BigInteger.Zero;
                if (i < k)
                {
                    a[i, i] = pivot;
                }
            }

            last = pivot;
        }

        return ([.. Enumerable.Range(0, n).Select(i => a[i, n])], last);
    }
}
