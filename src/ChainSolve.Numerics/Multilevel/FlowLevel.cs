using ChainSolve.Numerics.Operators;

namespace ChainSolve.Numerics.Multilevel;

/// <summary>
/// One level of a multilevel method: balance equations x_j out_j = sum over i of x_i f_ij. On the finest level f are rates;
/// on every other one they are the flows between groups of states, and x says by how much each group has to grow.
/// </summary>
/// <remarks>Nothing is ever subtracted, so small weights keep their digits. Not safe to share between threads.</remarks>
internal sealed class FlowLevel
{
    public FlowLevel(SparseRows inflows, double[] outflows, double[] weights)
    {
        (Inflows, Outflows, Weights) = (inflows, outflows, weights);
    }

    /// <summary>By state, what comes in and from where.</summary>
    public SparseRows Inflows { get; }

    /// <summary>The sum of what goes out of each state.</summary>
    public double[] Outflows { get; }

    /// <summary>The unknown of the balance equations.</summary>
    public double[] Weights { get; }

    public int Count => Weights.Length;

    /// <summary>Solves the balance of one state after the other, each with the newest weights of its neighbours.</summary>
    public void Sweep(bool isDown, CancellationToken cancellation)
    {
        const int Chunk = 65536;
        for (var first = 0; first < Count; first += Chunk)
        {
            cancellation.ThrowIfCancellationRequested();
            var last = Math.Min(Count, first + Chunk);
            if (isDown)
            {
                SweepDown(Count - last, Count - first);
            }
            else
            {
                SweepUp(first, last);
            }
        }
    }

    /// <summary>The largest relative difference between what comes into a state and what goes out of it.</summary>
    public double Imbalance()
    {
        const double Negligible = 1e-280;
        var worst = 0.0;
        for (var j = 0; j < Count; j++)
        {
            var sum = 0.0;
            for (var e = Inflows.Offsets[j]; e < Inflows.Offsets[j + 1]; e++)
            {
                sum += Inflows.Values[e] * Weights[Inflows.Targets[e]];
            }

            if (Weights[j] > Negligible)
            {
                worst = Math.Max(worst, Math.Abs((sum / Outflows[j] / Weights[j]) - 1));
            }
        }

        return worst;
    }

    /// <summary>Brings the largest weight near 1 by a power of two, which rounds nothing.</summary>
    public void Rescale()
    {
        var power = Math.ILogB(Weights.Max());
        for (var j = 0; power != 0 && j < Count; j++)
        {
            Weights[j] = Math.ScaleB(Weights[j], -power);
        }
    }

    private void SweepUp(int first, int last)
    {
        for (var j = first; j < last; j++)
        {
            Balance(j);
        }
    }

    private void SweepDown(int first, int last)
    {
        for (var j = last - 1; j >= first; j--)
        {
            Balance(j);
        }
    }

    private void Balance(int j)
    {
        var (offsets, sources, values, x) = (Inflows.Offsets, Inflows.Targets, Inflows.Values, Weights);
        var sum = 0.0;
        var end = (int)offsets[j + 1];
        for (var e = (int)offsets[j]; e < end; e++)
        {
            sum += values[e] * x[sources[e]];
        }

        // Flows below the smallest double are no ground for a verdict.
        var balanced = sum / Outflows[j];
        if (balanced > 0 && double.IsFinite(balanced))
        {
            x[j] = balanced;
        }
    }
}
