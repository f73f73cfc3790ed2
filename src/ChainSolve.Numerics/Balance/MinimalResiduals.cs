namespace ChainSolve.Numerics.Balance;

/// <summary>Generalised minimal residuals with restarts, preconditioned from the right (Saad and Schultz 1986; from memory).</summary>
internal static class MinimalResiduals
{
    private const int Restart = 30;
    private const int MaxRestarts = 30;

    /// <summary>Solves the system for a right side, until the residual has shrunk by the factor or a restart gains nothing.</summary>
    public static double[] Solve(FixedStateSystem system, double[] right, double factor)
    {
        var x = new double[right.Length];
        var r = (double[])right.Clone();
        var goal = factor * FixedStateSystem.Norm(right);
        var basis = Enumerable.Range(0, Restart + 1).Select(_ => new double[right.Length]).ToArray();
        var work = new double[right.Length];
        for (var (c, before) = (0, double.PositiveInfinity); c < MaxRestarts; c++)
        {
            var norm = FixedStateSystem.Norm(r);
            if (norm <= goal || !(norm < 0.99 * before))
            {
                break;
            }

            before = norm;
            Cycle(system, basis, work, r, norm, goal, x);
            system.Multiply(x, work);
            for (var i = 0; i < r.Length; i++)
            {
                r[i] = right[i] - work[i];
            }
        }

        return x;
    }

    private static void Cycle(FixedStateSystem system, double[][] basis, double[] work, double[] r, double norm, double goal, double[] x)
    {
        var h = new double[Restart + 1, Restart];
        var (cosines, sines, g) = (new double[Restart], new double[Restart], new double[Restart + 1]);
        g[0] = norm;
        for (var i = 0; i < r.Length; i++)
        {
            basis[0][i] = r[i] / norm;
        }

        var m = 0;
        while (m < Restart && Math.Abs(g[m]) > goal)
        {
            system.Precondition(basis[m], work);
            var next = basis[m + 1];
            system.Multiply(work, next);
            for (var k = 0; k <= m; k++)
            {
                h[k, m] = FixedStateSystem.Dot(next, basis[k]);
                FixedStateSystem.Add(-h[k, m], basis[k], next);
            }

            var length = FixedStateSystem.Norm(next);
            for (var i = 0; i < next.Length && length > 0; i++)
            {
                next[i] /= length;
            }

            for (var k = 0; k < m; k++)
            {
                (h[k, m], h[k + 1, m]) = ((cosines[k] * h[k, m]) + (sines[k] * h[k + 1, m]), (cosines[k] * h[k + 1, m]) - (sines[k] * h[k, m]));
            }

            var whole = double.Hypot(h[m, m], length);
            if (whole == 0)
            {
                break;
            }

            (cosines[m], sines[m]) = (h[m, m] / whole, length / whole);
            h[m, m] = whole;
            (g[m], g[m + 1]) = (cosines[m] * g[m], -sines[m] * g[m]);
            m++;
        }

        Collect(system, basis, work, h, g, m, x);
    }

    /// <summary>Adds to x the combination of the basis that leaves the smallest residual.</summary>
    private static void Collect(FixedStateSystem system, double[][] basis, double[] work, double[,] h, double[] g, int m, double[] x)
    {
        for (var k = m - 1; k >= 0; k--)
        {
            for (var q = k + 1; q < m; q++)
            {
                g[k] -= h[k, q] * g[q];
            }

            g[k] /= h[k, k];
        }

        var sum = new double[x.Length];
        for (var k = 0; k < m; k++)
        {
            FixedStateSystem.Add(g[k], basis[k], sum);
        }

        system.Precondition(sum, work);
        FixedStateSystem.Add(1, work, x);
    }
}
