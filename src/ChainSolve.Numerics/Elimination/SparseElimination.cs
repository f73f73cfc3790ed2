using ChainSolve.Numerics.Arithmetic;
using ChainSolve.Numerics.Iteration;
using ChainSolve.Numerics.Operators;

namespace ChainSolve.Numerics.Elimination;

/// <summary>
/// Elimination of a sparse chain in an order of small fill, row by row: a row takes the updates of all states before it,
/// then its pivot is the sum of what is left behind the diagonal, so no pivot is ever a difference.
/// </summary>
internal sealed class SparseElimination : IElimination
{
    private readonly int count;
    private readonly int[] order;

    // Row i in the new numbering: shares below the diagonal, rates at the time of elimination above it.
    private readonly int[][] belowAt;
    private readonly WideNumber[][] below;
    private readonly int[][] aboveAt;
    private readonly WideNumber[][] above;
    private readonly WideNumber[] pivots;

    private SparseElimination(int[] order)
    {
        this.order = order;
        count = order.Length;
        (belowAt, below, aboveAt, above) = (new int[count][], new WideNumber[count][], new int[count][], new WideNumber[count][]);
        pivots = new WideNumber[count];
    }

    public double RelativeBound { get; private set; }

    /// <summary>Eliminates all states; parameters as in the dense form, and the order; null where it fills in too much.</summary>
    public static SparseElimination Of(Generator chain, WideNumber[]? toEnd, int[]? order, SolveContext context)
    {
        if (order is null)
        {
            throw new NotConvergedException(
                $"The elimination of {chain.StateCount} states fills in beyond {EliminationOrder.MaxFill} entries. Use an iteration.");
        }

        var result = new SparseElimination(order);
        result.Factor(chain, toEnd, context);
        return result;
    }

    public WideNumber[] Stationary()
    {
        var x = new WideNumber[count];
        x[count - 1] = WideNumber.One;
        SpreadBack(x);
        return Unordered(x);
    }

    public WideNumber[] Sojourns(double[] start)
    {
        var flow = new WideNumber[count];
        for (var k = 0; k < count; k++)
        {
            flow[k] += start[order[k]];
            if (flow[k].IsZero)
            {
                continue;
            }

            flow[k] /= pivots[k];
            for (var e = 0; e < aboveAt[k].Length; e++)
            {
                flow[aboveAt[k][e]] += flow[k] * above[k][e];
            }
        }

        SpreadBack(flow);
        return Unordered(flow);
    }

    public WideNumber[] Earnings(double[] rewards)
    {
        var m = new WideNumber[count];
        for (var i = 0; i < count; i++)
        {
            WideNumber sum = rewards[order[i]];
            for (var e = 0; e < belowAt[i].Length; e++)
            {
                sum += below[i][e] * m[belowAt[i][e]];
            }

            m[i] = sum;
        }

        for (var k = count - 1; k >= 0; k--)
        {
            var sum = m[k];
            for (var e = 0; e < aboveAt[k].Length; e++)
            {
                sum += above[k][e] * m[aboveAt[k][e]];
            }

            m[k] = sum / pivots[k];
        }

        return Unordered(m);
    }

    private void SpreadBack(WideNumber[] x)
    {
        for (var i = count - 1; i > 0; i--)
        {
            for (var e = 0; e < belowAt[i].Length && !x[i].IsZero; e++)
            {
                x[belowAt[i][e]] += x[i] * below[i][e];
            }
        }
    }

    private WideNumber[] Unordered(WideNumber[] x)
    {
        var result = new WideNumber[count];
        for (var k = 0; k < count; k++)
        {
            result[order[k]] = x[k];
        }

        return result;
    }

    private void Factor(Generator chain, WideNumber[]? toEnd, SolveContext context)
    {
        var place = new int[count];
        for (var k = 0; k < count; k++)
        {
            place[order[k]] = k;
        }

        var end = new WideNumber[count];
        var row = new WideNumber[count];
        var mark = new int[count];
        Array.Fill(mark, -1);
        var pending = new PriorityQueue<int, int>();
        var later = new List<int>();
        var earlier = new List<int>();
        var roundings = 0.0;
        for (var i = 0; i < count; i++)
        {
            if ((i & 255) == 0)
            {
                context.Cancellation.ThrowIfCancellationRequested();
                context.Progress?.Report(new SolveProgress("elimination", i, count, ""));
            }

            later.Clear();
            earlier.Clear();
            var at = i;
            end[i] = toEnd is null ? WideNumber.Zero : toEnd[order[i]];
            for (var e = chain.Rows.Offsets[order[i]]; e < chain.Rows.Offsets[order[i] + 1]; e++)
            {
                if (chain.Rows.Values[e] > 0)
                {
                    Touch(place[chain.Rows.Targets[e]]);
                    row[place[chain.Rows.Targets[e]]] = chain.Rows.Values[e];
                }
            }

            while (pending.TryDequeue(out var k, out _))
            {
                earlier.Add(k);
                var share = row[k] / pivots[k];
                row[k] = share;
                end[i] += share * end[k];
                var (targets, values) = (aboveAt[k], above[k]);
                for (var e = 0; e < targets.Length; e++)
                {
                    var j = targets[e];
                    if (j == i)
                    {
                        continue;
                    }

                    if (mark[j] != i)
                    {
                        Touch(j);
                        row[j] = share * values[e];
                        continue;
                    }

                    row[j] += share * values[e];
                }
            }

            var pivot = end[i];
            foreach (var j in later)
            {
                pivot += row[j];
            }

            if (pivot.IsZero)
            {
                EliminationFaults.CheckLast(order[i], i == count - 1 && toEnd is null);
            }

            pivots[i] = pivot;
            belowAt[i] = [.. earlier];
            below[i] = [.. earlier.Select(k => row[k])];
            aboveAt[i] = [.. later];
            above[i] = [.. later.Select(j => row[j])];
            roundings += later.Count + earlier.Count + 6.0;

            void Touch(int j)
            {
                mark[j] = at;
                if (j < at)
                {
                    pending.Enqueue(j, j);
                }
                else
                {
                    later.Add(j);
                }
            }
        }

        RelativeBound = WideNumber.Epsilon * 4 * (count + 1.0) * roundings;
    }
}
