namespace ChainSolve.Numerics.Multilevel;

/// <summary>
/// Speeds up an iteration on positive weights: the next weights are the combination of the last results whose gains cancel best
/// (Anderson 1965; for aggregation cycles De Sterck and others 2010; both from memory).
/// </summary>
/// <remarks>
/// Gains are relative, weight by weight, so that small weights are looked after as large ones are. A combination that would
/// move a weight far is not taken, so weights stay positive. Not safe to share between threads.
/// </remarks>
internal sealed class Recombination
{
    private const int Depth = 5;
    private const double Negligible = 1e-280;

    // A pivot below this share of its diagonal has no digits left.
    private const double Dependent = 1e-10;
    private const double Furthest = 0.5;

    private readonly List<(double[] Gains, double[] Result)> history = [];

    /// <summary>Forgets all results.</summary>
    public void Restart() => history.Clear();

    /// <summary>Replaces the result of a step by a better combination with earlier ones, where there is one.</summary>
    public void Improve(double[] before, double[] after)
    {
        // The list turns round, so that no vector is made twice.
        var (gains, result) = history.Count > Depth ? history[0] : (new double[after.Length], new double[after.Length]);
        if (history.Count > Depth)
        {
            history.RemoveAt(0);
        }

        var (sumBefore, sumAfter) = (before.Sum(), after.Sum());
        for (var i = 0; i < after.Length; i++)
        {
            result[i] = after[i] / sumAfter;
            gains[i] = before[i] > Negligible * sumBefore ? (result[i] * sumBefore / before[i]) - 1 : 0;
        }

        history.Add((gains, result));
        if (Shares(gains) is { } shares && !Combine(shares, after))
        {
            history.RemoveRange(0, history.Count - 1);
        }
    }

    /// <summary>By least squares the share of each earlier step that cancels the gains best; null for none.</summary>
    private double[]? Shares(double[] gains)
    {
        var m = history.Count - 1;
        var a = new double[m, m + 1];
        for (var p = 0; p < m; p++)
        {
            for (var q = p; q <= m; q++)
            {
                a[p, q] = q == m ? Dot(gains, history[p].Gains, gains, null) : Dot(gains, history[p].Gains, gains, history[q].Gains);
                if (q < m)
                {
                    a[q, p] = a[p, q];
                }
            }
        }

        return m == 0 ? null : Solve(a, m);
    }

    private static double Dot(double[] gains, double[] p, double[] same, double[]? q)
    {
        var sum = 0.0;
        for (var i = 0; i < gains.Length; i++)
        {
            sum += (gains[i] - p[i]) * (q is null ? same[i] : same[i] - q[i]);
        }

        return sum;
    }

    /// <summary>Newest first, as the old steps are those that add little; dependent ones get no share.</summary>
    private static double[] Solve(double[,] a, int m)
    {
        var shares = new double[m];
        var isUsed = new bool[m];
        var diagonal = Enumerable.Range(0, m).Select(k => a[k, k]).ToArray();
        for (var k = m - 1; k >= 0; k--)
        {
            isUsed[k] = a[k, k] > Dependent * diagonal[k];
            for (var p = 0; isUsed[k] && p < k; p++)
            {
                var factor = a[p, k] / a[k, k];
                for (var q = 0; q <= m; q++)
                {
                    a[p, q] -= factor * a[k, q];
                }
            }
        }

        for (var k = 0; k < m; k++)
        {
            var sum = a[k, m];
            for (var q = 0; q < k; q++)
            {
                sum -= a[k, q] * shares[q];
            }

            shares[k] = isUsed[k] ? sum / a[k, k] : 0;
        }

        return shares;
    }

    private bool Combine(double[] shares, double[] after)
    {
        var newest = history[^1].Result;
        for (var i = 0; i < after.Length; i++)
        {
            var move = 0.0;
            for (var k = 0; k < shares.Length; k++)
            {
                move += shares[k] * (history[k].Result[i] - newest[i]);
            }

            if (Math.Abs(move) > Furthest * newest[i] && newest[i] > Negligible)
            {
                newest.CopyTo(after, 0);
                return false;
            }

            after[i] = Math.Abs(move) > Furthest * newest[i] ? newest[i] : newest[i] + move;
        }

        return true;
    }
}
