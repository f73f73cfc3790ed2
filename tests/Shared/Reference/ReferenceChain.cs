namespace ChainSolve.Tests.Shared.Reference;

/// <summary>
/// A small chain solved slowly and in extended precision. Transient values come from the Taylor series of a non-negative matrix
/// and repeated squaring in 256 bits, long-run values from exact linear systems.
/// </summary>
internal sealed partial class ReferenceChain
{
    private readonly List<(int From, int To, double Rate)>[] outgoing;

    public ReferenceChain(int count, IEnumerable<(int From, int To, double Rate)> moves)
    {
        Count = count;
        outgoing = [.. Enumerable.Range(0, count).Select(_ => new List<(int, int, double)>())];
        foreach (var move in moves)
        {
            if (move.From != move.To && move.Rate > 0)
            {
                outgoing[move.From].Add(move);
            }
        }
    }

    public int Count { get; }

    /// <summary>The largest exit rate.</summary>
    public double MaxExitRate => outgoing.Max(o => o.Sum(m => m.Rate));

    /// <summary>The distribution at a time; with a mask, of the chain without the states that are false.</summary>
    public BigFloat[] Distribution(double[] start, double time, bool[]? alive = null) =>
        TimesMatrix(start, alive, Exponential(time, alive, []))[..Count];

    /// <summary>The totals of rewards from 0 to a time, one a reward.</summary>
    public BigFloat[] Totals(double[] start, double time, IReadOnlyList<double[]> rewards, bool[]? alive = null) =>
        TimesMatrix(start, alive, Exponential(time, alive, rewards))[Count..];

    /// <summary>The distribution, and behind it the totals of rewards.</summary>
    public BigFloat[] DistributionAndTotals(double[] start, double time, IReadOnlyList<double[]> rewards, bool[]? alive = null) =>
        TimesMatrix(start, alive, Exponential(time, alive, rewards));

    /// <summary>The transition matrix P(t), with the totals of rewards as further columns.</summary>
    public BigFloat[,] Exponential(double time, bool[]? alive, IReadOnlyList<double[]> rewards)
    {
        var size = Count + rewards.Count;
        var result = Identity(size);
        BigFloat top = 0.0;
        var exits = new BigFloat[Count];
        for (var i = 0; i < Count; i++)
        {
            exits[i] = outgoing[i].Aggregate(BigFloat.Zero, (sum, m) => sum + m.Rate);
            top = exits[i] > top ? exits[i] : top;
        }

        if (time == 0)
        {
            return result;
        }

        if (top.IsZero)
        {
            top = BigFloat.One / time;
        }

        // One step is so short that its series gains five bits a term; squaring brings back the whole time.
        var squarings = Math.Max(0, (int)(top * time).LeadingPower + 6);
        var step = ((BigFloat)time).TimesPowerOfTwo(-squarings);
        var lines = Lines(exits, top, step, alive, rewards);
        var decay = BigFloat.ExpOfSmall(BigFloat.Zero - (top * step));
        var term = Identity(size);
        for (var k = 1; k <= size + 50; k++)
        {
            term = TermTimes(term, lines, k);
            for (var i = 0; i < size; i++)
            {
                for (var j = 0; j < size; j++)
                {
                    result[i, j] += term[i, j];
                }
            }
        }

        for (var i = 0; i < size; i++)
        {
            for (var j = 0; j < size; j++)
            {
                result[i, j] *= decay;
            }
        }

        for (var s = 0; s < squarings; s++)
        {
            result = Square(result);
        }

        return result;
    }

    private static BigFloat[,] Identity(int size)
    {
        var matrix = new BigFloat[size, size];
        for (var i = 0; i < size; i++)
        {
            matrix[i, i] = BigFloat.One;
        }

        return matrix;
    }

    private static BigFloat[,] TermTimes(BigFloat[,] term, List<(int To, BigFloat Weight)>[] lines, int divisor)
    {
        var size = lines.Length;
        var next = new BigFloat[size, size];
        for (var i = 0; i < size; i++)
        {
            for (var m = 0; m < size; m++)
            {
                if (term[i, m].IsZero)
                {
                    continue;
                }

                var scaled = term[i, m] / divisor;
                foreach (var (to, weight) in lines[m])
                {
                    next[i, to] += scaled * weight;
                }
            }
        }

        return next;
    }

    private static BigFloat[,] Square(BigFloat[,] matrix)
    {
        var size = matrix.GetLength(0);
        var result = new BigFloat[size, size];
        for (var i = 0; i < size; i++)
        {
            for (var m = 0; m < size; m++)
            {
                var left = matrix[i, m];
                if (left.IsZero)
                {
                    continue;
                }

                for (var j = 0; j < size; j++)
                {
                    if (!matrix[m, j].IsZero)
                    {
                        result[i, j] += left * matrix[m, j];
                    }
                }
            }
        }

        return result;
    }

    /// <summary>The entries of (Q + qI)h, extended by the rewards; all of them are sums and differences of exact numbers and not negative.</summary>
    private List<(int To, BigFloat Weight)>[] Lines(
        BigFloat[] exits, BigFloat top, BigFloat step, bool[]? alive, IReadOnlyList<double[]> rewards)
    {
        var lines = new List<(int, BigFloat)>[Count + rewards.Count];
        for (var i = 0; i < Count; i++)
        {
            lines[i] = [];
            if (alive is not null && !alive[i])
            {
                // Out of the chain: the row is left empty and nothing enters it; the start's mass there is dropped.
                continue;
            }

            lines[i].Add((i, (top - exits[i]) * step));
            foreach (var (_, to, rate) in outgoing[i])
            {
                if (alive is null || alive[to])
                {
                    lines[i].Add((to, (BigFloat)rate * step));
                }
            }

            for (var r = 0; r < rewards.Count; r++)
            {
                if (rewards[r][i] != 0)
                {
                    lines[i].Add((Count + r, (BigFloat)rewards[r][i] * step));
                }
            }
        }

        for (var r = 0; r < rewards.Count; r++)
        {
            lines[Count + r] = [(Count + r, top * step)];
        }

        return lines;
    }

    private BigFloat[] TimesMatrix(double[] start, bool[]? alive, BigFloat[,] matrix)
    {
        var size = matrix.GetLength(0);
        var result = new BigFloat[size];
        for (var i = 0; i < Count; i++)
        {
            if (start[i] == 0 || (alive is not null && !alive[i]))
            {
                continue;
            }

            for (var j = 0; j < size; j++)
            {
                result[j] += (BigFloat)start[i] * matrix[i, j];
            }
        }

        return result;
    }
}
