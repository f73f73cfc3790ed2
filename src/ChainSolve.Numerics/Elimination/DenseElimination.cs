using ChainSolve.Numerics.Arithmetic;
using ChainSolve.Numerics.Operators;

namespace ChainSolve.Numerics.Elimination;

/// <summary>Elimination on a full matrix, in the order of the states.</summary>
internal sealed class DenseElimination : IElimination
{
    private readonly int count;

    // Above the diagonal the rates at the time of elimination, below it those rates over the pivot of their column.
    private readonly WideNumber[] a;
    private readonly WideNumber[] pivots;

    private DenseElimination(int count)
    {
        this.count = count;
        a = new WideNumber[count * count];
        pivots = new WideNumber[count];
    }

    public double RelativeBound => WideNumber.Epsilon * 4 * (count + 1.0) * (count + 1.0) * (count + 6.0);

    /// <summary>Eliminates all states.</summary>
    /// <param name="chain">The chain between the states.</param>
    /// <param name="toEnd">The rate of each state to the end; null for a chain that has none.</param>
    /// <param name="cancellation">Looked at once a state.</param>
    public static DenseElimination Of(Generator chain, WideNumber[]? toEnd, CancellationToken cancellation)
    {
        var n = chain.StateCount;
        var result = new DenseElimination(n);
        var end = (WideNumber[]?)toEnd?.Clone() ?? new WideNumber[n];
        var a = result.a;
        for (var i = 0; i < n; i++)
        {
            for (var e = chain.Rows.Offsets[i]; e < chain.Rows.Offsets[i + 1]; e++)
            {
                a[(i * n) + chain.Rows.Targets[e]] = chain.Rows.Values[e];
            }
        }

        for (var k = 0; k < n; k++)
        {
            cancellation.ThrowIfCancellationRequested();
            var pivot = end[k];
            for (var j = k + 1; j < n; j++)
            {
                pivot += a[(k * n) + j];
            }

            result.pivots[k] = pivot;
            if (pivot.IsZero)
            {
                EliminationFaults.CheckLast(k, k == n - 1 && toEnd is null);
                continue;
            }

            for (var i = k + 1; i < n; i++)
            {
                if (a[(i * n) + k].IsZero)
                {
                    continue;
                }

                var share = a[(i * n) + k] / pivot;
                a[(i * n) + k] = share;
                end[i] += share * end[k];
                for (var j = k + 1; j < n; j++)
                {
                    if (j != i && !a[(k * n) + j].IsZero)
                    {
                        a[(i * n) + j] += share * a[(k * n) + j];
                    }
                }
            }
        }

        return result;
    }

    public WideNumber[] Stationary()
    {
        var x = new WideNumber[count];
        x[count - 1] = WideNumber.One;
        SpreadBack(x);
        return x;
    }

    public WideNumber[] Sojourns(double[] start)
    {
        var flow = new WideNumber[count];
        for (var k = 0; k < count; k++)
        {
            flow[k] += start[k];
            if (flow[k].IsZero)
            {
                continue;
            }

            var perRate = flow[k] / pivots[k];
            for (var j = k + 1; j < count; j++)
            {
                flow[j] += perRate * a[(k * count) + j];
            }

            flow[k] = perRate;
        }

        SpreadBack(flow);
        return flow;
    }

    public WideNumber[] Earnings(double[] rewards)
    {
        var m = new WideNumber[count];
        for (var i = 0; i < count; i++)
        {
            var sum = (WideNumber)rewards[i];
            for (var k = 0; k < i; k++)
            {
                sum += a[(i * count) + k] * m[k];
            }

            m[i] = sum;
        }

        for (var k = count - 1; k >= 0; k--)
        {
            var sum = m[k];
            for (var j = k + 1; j < count; j++)
            {
                sum += a[(k * count) + j] * m[j];
            }

            m[k] = sum / pivots[k];
        }

        return m;
    }

    /// <summary>Adds to each entry what later ones bring: from the last to the first.</summary>
    private void SpreadBack(WideNumber[] x)
    {
        for (var i = count - 1; i > 0; i--)
        {
            for (var k = 0; k < i && !x[i].IsZero; k++)
            {
                x[k] += x[i] * a[(i * count) + k];
            }
        }
    }
}
