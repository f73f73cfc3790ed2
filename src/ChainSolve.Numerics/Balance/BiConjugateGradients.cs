namespace ChainSolve.Numerics.Balance;

/// <summary>Stabilised bi-conjugate gradients, preconditioned from the right (van der Vorst 1992; from memory).</summary>
internal static class BiConjugateGradients
{
    private const int MaxSteps = 400;

    /// <summary>Solves the system for a right side, until the residual has shrunk by the factor or no step helps.</summary>
    public static double[] Solve(FixedStateSystem system, double[] right, double factor)
    {
        var n = right.Length;
        var (x, r, p, ap, s, t) = (new double[n], (double[])right.Clone(), new double[n], new double[n], new double[n], new double[n]);
        var shadow = (double[])right.Clone();
        var (pHat, sHat) = (new double[n], new double[n]);
        var goal = factor * FixedStateSystem.Norm(right);
        var (rho, alpha, omega) = (1.0, 1.0, 1.0);
        for (var step = 0; step < MaxSteps && FixedStateSystem.Norm(r) > goal; step++)
        {
            var next = FixedStateSystem.Dot(shadow, r);
            var beta = step == 0 ? 0 : next / rho * (alpha / omega);
            rho = next;
            for (var i = 0; i < n; i++)
            {
                p[i] = r[i] + (beta * (p[i] - (omega * ap[i])));
            }

            system.Precondition(p, pHat);
            system.Multiply(pHat, ap);
            alpha = rho / FixedStateSystem.Dot(shadow, ap);
            for (var i = 0; i < n; i++)
            {
                s[i] = r[i] - (alpha * ap[i]);
            }

            system.Precondition(s, sHat);
            system.Multiply(sHat, t);
            var tt = FixedStateSystem.Dot(t, t);
            omega = tt == 0 ? 0 : FixedStateSystem.Dot(t, s) / tt;
            if (!double.IsFinite(alpha) || !double.IsFinite(omega))
            {
                break;
            }

            for (var i = 0; i < n; i++)
            {
                x[i] += (alpha * pHat[i]) + (omega * sHat[i]);
                r[i] = s[i] - (omega * t[i]);
            }

            if (omega == 0)
            {
                break;
            }
        }

        return x;
    }
}
