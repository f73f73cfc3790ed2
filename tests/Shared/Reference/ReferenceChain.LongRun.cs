using System.Numerics;

namespace ChainSolve.Tests.Shared.Reference;

/// <summary>The long-run half: everything here is exact until the last division.</summary>
internal sealed partial class ReferenceChain
{
    /// <summary>Which states can be reached from which, themselves included.</summary>
    public bool[,] Reachable()
    {
        var reach = new bool[Count, Count];
        for (var i = 0; i < Count; i++)
        {
            var open = new Stack<int>([i]);
            reach[i, i] = true;
            while (open.TryPop(out var at))
            {
                foreach (var (_, to, _) in outgoing[at])
                {
                    if (!reach[i, to])
                    {
                        reach[i, to] = true;
                        open.Push(to);
                    }
                }
            }
        }

        return reach;
    }

    /// <summary>The closed classes, each with its states ascending.</summary>
    public IReadOnlyList<int[]> ClosedClasses()
    {
        var reach = Reachable();
        var states = Enumerable.Range(0, Count).ToArray();
        var closed = states.Where(i => states.All(j => !reach[i, j] || reach[j, i])).ToArray();
        return [.. closed.GroupBy(i => states.First(j => reach[i, j] && reach[j, i])).Select(g => g.ToArray())];
    }

    /// <summary>The stationary vector of one closed class, over all states.</summary>
    public BigFloat[] Stationary(int[] members)
    {
        var (rates, _) = Whole();
        var n = members.Length - 1;
        var matrix = new BigInteger[n, n];
        var right = new BigInteger[n];
        for (var j = 0; j < n; j++)
        {
            right[j] = rates[members[n], members[j]];
            for (var i = 0; i < n; i++)
            {
                matrix[j, i] = i == j ? Exit(rates, members[i]) : -rates[members[i], members[j]];
            }
        }

        var (numerators, denominator) = n == 0 ? ([], BigInteger.One) : ExactSystem.Solve(matrix, right);
        var sum = numerators.Aggregate(denominator, (s, x) => s + x);
        var result = new BigFloat[Count];
        for (var i = 0; i < n; i++)
        {
            result[members[i]] = BigFloat.Ratio(numerators[i], sum);
        }

        result[members[n]] = BigFloat.Ratio(denominator, sum);
        return result;
    }

    /// <summary>The limit of the distribution from a start.</summary>
    public BigFloat[] Limit(double[] start)
    {
        var result = new BigFloat[Count];
        foreach (var members in ClosedClasses())
        {
            var chance = EndsIn(start, members);
            var vector = Stationary(members);
            foreach (var i in members)
            {
                result[i] = chance * vector[i];
            }
        }

        return result;
    }

    /// <summary>The chance of ever entering a set of states.</summary>
    public BigFloat EndsIn(double[] start, IReadOnlyCollection<int> set)
    {
        var reach = Reachable();
        var open = Enumerable.Range(0, Count).Where(i => !set.Contains(i) && set.Any(j => reach[i, j])).ToArray();
        var (rates, _) = Whole();
        var right = open.Select(i => set.Aggregate(BigInteger.Zero, (s, j) => s + rates[i, j])).ToArray();
        var (numerators, denominator) = ExactSystem.Solve(Between(rates, open), right);
        var sum = BigFloat.Zero;
        for (var k = 0; k < open.Length; k++)
        {
            sum += (BigFloat)start[open[k]] * BigFloat.Ratio(numerators[k], denominator);
        }

        return set.Aggregate(sum, (s, j) => s + start[j]);
    }

    /// <summary>
    /// A raw moment of the time until a set is entered, which must happen from everywhere that the start reaches;
    /// a start inside has time 0.
    /// </summary>
    public BigFloat Moment(double[] start, IReadOnlyCollection<int> set, int order)
    {
        var open = Enumerable.Range(0, Count).Where(i => !set.Contains(i)).ToArray();
        return UntilMoments(start, open, [.. open.Select(_ => BigInteger.One)], 0, order);
    }

    /// <summary>The expected reward until a set is entered.</summary>
    public BigFloat TotalUntil(double[] start, IReadOnlyCollection<int> set, double[] rewards)
    {
        var open = Enumerable.Range(0, Count).Where(i => !set.Contains(i)).ToArray();
        var shift = rewards.Where(r => r != 0).Select(r => BigFloat.Split(r).Shift).DefaultIfEmpty(0).Min();
        return UntilMoments(start, open, [.. open.Select(i => Scaled(rewards[i], shift))], shift, 1);
    }

    private BigFloat UntilMoments(double[] start, int[] open, BigInteger[] right, int rightShift, int order)
    {
        var (rates, shift) = Whole();
        var matrix = Between(rates, open);
        var denominators = BigInteger.One;
        for (var k = 1; k <= order; k++)
        {
            var (numerators, denominator) = ExactSystem.Solve(matrix, [.. right.Select(r => r * k)]);
            right = numerators;
            denominators *= denominator;
        }

        var sum = BigFloat.Zero;
        for (var k = 0; k < open.Length; k++)
        {
            sum += (BigFloat)start[open[k]] * BigFloat.Ratio(right[k], denominators, rightShift - ((long)order * shift));
        }

        return sum;
    }

    private static BigInteger Scaled(double value, int shift)
    {
        if (value == 0)
        {
            return BigInteger.Zero;
        }

        var (integer, own) = BigFloat.Split(value);
        return integer << (own - shift);
    }

    private static BigInteger Exit(BigInteger[,] rates, int state)
    {
        var sum = BigInteger.Zero;
        for (var j = 0; j < rates.GetLength(0); j++)
        {
            sum += rates[state, j];
        }

        return sum;
    }

    private static BigInteger[,] Between(BigInteger[,] rates, int[] open)
    {
        var matrix = new BigInteger[open.Length, open.Length];
        for (var i = 0; i < open.Length; i++)
        {
            for (var j = 0; j < open.Length; j++)
            {
                matrix[i, j] = i == j ? Exit(rates, open[i]) : -rates[open[i], open[j]];
            }
        }

        return matrix;
    }

    /// <summary>All rates as whole numbers times one power of two.</summary>
    private (BigInteger[,] Rates, int Shift) Whole()
    {
        var shift = outgoing.SelectMany(o => o).Select(m => BigFloat.Split(m.Rate).Shift).DefaultIfEmpty(0).Min();
        var rates = new BigInteger[Count, Count];
        foreach (var (from, to, rate) in outgoing.SelectMany(o => o))
        {
            rates[from, to] += Scaled(rate, shift);
        }

        return (rates, shift);
    }
}
