using ChainSolve.Numerics.Arithmetic;

namespace ChainSolve.Numerics.Transient;

/// <summary>
/// A time so short that hardly anything moves in it: transition probabilities and totals over it by the series of
/// exp((Q + qI)s), all of whose terms are non-negative. No exponential is evaluated: rows are scaled to their known sum.
/// </summary>
/// <remarks>
/// The series runs until what is left of it is below the last digit of the smallest element that is not zero, so that the
/// tiniest probabilities are as accurate as the others. q is twice the largest exit rate: the diagonal loses no digits.
/// </remarks>
internal sealed class ShortStep
{
    /// <summary>The largest q·s that is meant.</summary>
    public const double Longest = 0.125;

    // Digits of the series beyond this are not kept, relative to the element.
    private const double Cut = 1e-34;

    // A remainder below this is as good as none.
    private const double Nothing = 1e-310;

    private readonly ReachedChain chain;
    private readonly double step;
    private readonly int[][] places;
    private readonly DoubleDouble[][] steps;
    private readonly DoubleDouble mean;

    /// <summary>Prepares a step of a length for a chain in which something moves.</summary>
    public ShortStep(ReachedChain chain, double step)
    {
        this.chain = chain;
        this.step = step;
        var q = UniformRate(chain);
        mean = DoubleDouble.Product(q, step);
        places = new int[chain.Count][];
        steps = new DoubleDouble[chain.Count][];
        for (var i = 0; i < chain.Count; i++)
        {
            DoubleDouble exit = 0;
            foreach (var rate in chain.Rates[i])
            {
                exit += rate;
            }

            places[i] = [.. chain.Targets[i], i];
            steps[i] = [.. chain.Rates[i].Select(r => r * step), (q - exit) * step];
        }
    }

    /// <summary>Twice the largest exit rate.</summary>
    public static double UniformRate(ReachedChain chain) => 2 * chain.LargestExit;

    /// <summary>The transition matrix of the step, and the totals of rewards over it, one column a reward.</summary>
    public (WideBlock Matrix, WideBlock Totals) All(WideBlock rewards, CancellationToken cancellation)
    {
        var count = chain.Count;
        var term = new WideBlock(count, count);
        for (var i = 0; i < count; i++)
        {
            term.High[(i * count) + i] = 1;
        }

        var matrix = Copy(term);
        matrix.Pattern = chain.Paths;
        var (totals, left, terms) = Sum(term, matrix, rewards, cancellation);
        var units = (2 * TermUnits(terms)) + (2 * WideRows.ProductUnits(count)) + 100;
        matrix.Slack = WideProduct.SlackOf(count);
        SetBounds(matrix, units, left);
        for (var i = 0; i < count; i++)
        {
            WideProduct.Scale(matrix, i, 1);
        }

        return (matrix, totals);
    }

    /// <summary>The totals of rewards over the step from every state, one column a reward.</summary>
    public WideBlock Totals(WideBlock rewards, CancellationToken cancellation)
    {
        var (totals, _, _) = Sum(null, null, rewards, cancellation);
        return totals;
    }

    /// <summary>A row that is exactly known times the transition matrix of the step.</summary>
    /// <param name="row">One row; its sum is kept.</param>
    /// <param name="sum">The sum of the row.</param>
    /// <param name="cancellation">Looked at once a term.</param>
    public WideBlock Row(WideBlock row, DoubleDouble sum, CancellationToken cancellation)
    {
        var term = Enumerable.Range(0, chain.Count).Select(row.Of).ToArray();
        var result = (DoubleDouble[])term.Clone();
        var remainder = new Remainder(mean.High);
        var pattern = -1;
        var terms = 1;
        for (; ; terms++)
        {
            cancellation.ThrowIfCancellationRequested();
            var next = new DoubleDouble[term.Length];
            for (var i = 0; i < term.Length; i++)
            {
                for (var e = 0; term[i].High > 0 && e < places[i].Length; e++)
                {
                    next[places[i][e]] += term[i] * (steps[i][e] / terms);
                }
            }

            term = next;
            var (smallest, reached) = (double.PositiveInfinity, 0);
            for (var i = 0; i < term.Length; i++)
            {
                result[i] += term[i];
                smallest = result[i].High > 0 ? Math.Min(smallest, result[i].High) : smallest;
                reached += term[i].High > 0 ? 1 : 0;
            }

            remainder.Next();
            if (remainder.Value * sum.High is var left && (left < Nothing || (reached == pattern && left <= smallest * Cut)))
            {
                break;
            }

            pattern = reached;
        }

        var block = new WideBlock(1, term.Length);
        for (var i = 0; i < term.Length; i++)
        {
            block.Set(i, result[i]);
        }

        // The sums here are plain ones of two doubles, no worse than those of the matrix by rows.
        var most = chain.Count + 2;
        var units = (2 * terms * (WideRows.ProductUnits(most) + (3 * most) + 80)) + (2 * WideRows.ProductUnits(chain.Count)) + 100;
        block.Slack = WideProduct.SlackOf(chain.Count);
        SetBounds(block, units, remainder.Value * sum.High);
        WideProduct.Scale(block, 0, sum);
        return block;
    }

    private static WideBlock Copy(WideBlock block)
    {
        var copy = new WideBlock(block.Rows, block.Columns);
        block.High.CopyTo(copy.High, 0);
        block.Low.CopyTo(copy.Low, 0);
        return copy;
    }

    private static void SetBounds(WideBlock block, double units, double left)
    {
        var relative = (units + 2) * DoubleDouble.Unit * WideBlock.BoundScale;
        var absolute = (left + 1e-314) * WideBlock.BoundScale * 2;
        for (var at = 0; at < block.High.Length; at++)
        {
            block.Bound[at] = (block.High[at] * relative * (1 + 1e-14)) + absolute;
        }

        for (var i = 0; i < block.Rows; i++)
        {
            block.ApplyPattern(i);
        }
    }

    /// <summary>
    /// The relative error of a sum of terms, in units of 2⁻¹⁰⁶: each term takes on that of an entry of Q + qI, of a
    /// product by rows, and of the division by its number.
    /// </summary>
    private double TermUnits(int terms)
    {
        var most = chain.MostTransitions + 2;
        return terms * (WideRows.ProductUnits(most) + (3 * most) + 80);
    }

    /// <summary>Adds the series from its second term on; what the remainder is at most, and the number of terms.</summary>
    private (WideBlock Totals, double Left, int Terms) Sum(WideBlock? term, WideBlock? sum, WideBlock rewards, CancellationToken cancellation)
    {
        var earned = Copy(rewards);
        var totals = new WideBlock(rewards.Rows, rewards.Columns) { Pattern = chain.PathsTo(rewards) };
        var decay = Decay();
        AddTotals(totals, earned, Share(0, decay));
        var largest = rewards.High.Length == 0 ? 0 : rewards.High.Max();
        var remainder = new Remainder(mean.High);
        var pattern = (-1, -1);
        var terms = 1;
        for (; ; terms++)
        {
            cancellation.ThrowIfCancellationRequested();
            var smallest = double.PositiveInfinity;
            var reached = (0, 0);
            if (term is not null)
            {
                term = Times(term, terms, cancellation);
                Add(sum!, term);
                (smallest, reached.Item1) = Pattern(sum!, term);
            }

            var smallestTotal = double.PositiveInfinity;
            if (rewards.Columns > 0)
            {
                earned = Times(earned, terms, cancellation);
                AddTotals(totals, earned, Share(terms, decay));
                (smallestTotal, reached.Item2) = Pattern(totals, earned);
            }

            remainder.Next();
            var left = remainder.Value;
            var leftTotal = left * step * largest;
            if (reached == pattern && (left < Nothing || left <= smallest * Cut) && (leftTotal < Nothing || leftTotal <= smallestTotal * Cut))
            {
                break;
            }

            if (left < Nothing && leftTotal < Nothing)
            {
                break;
            }

            pattern = reached;
        }

        SetBounds(totals, TermUnits(terms) + 200, remainder.Value * step * largest);
        return (totals, remainder.Value, terms);
    }

    /// <summary>(Q + qI)·s·block / divisor.</summary>
    private WideBlock Times(WideBlock block, int divisor, CancellationToken cancellation)
    {
        var result = new WideBlock(block.Rows, block.Columns);
        var (high, low) = (new double[chain.MostTransitions + 1], new double[chain.MostTransitions + 1]);
        for (var i = 0; i < block.Rows; i++)
        {
            cancellation.ThrowIfCancellationRequested();
            for (var e = 0; e < places[i].Length; e++)
            {
                var entry = steps[i][e] / divisor;
                (high[e], low[e]) = (entry.High, entry.Low);
            }

            WideRows.Multiply(
                places[i], high, low, block.High, block.Low, block.Columns,
                result.High.AsSpan(i * block.Columns, block.Columns), result.Low.AsSpan(i * block.Columns, block.Columns));
        }

        return result;
    }

    private static void Add(WideBlock sum, WideBlock term)
    {
        for (var at = 0; at < sum.High.Length; at++)
        {
            if (term.High[at] > 0)
            {
                sum.Set(at, sum.Of(at) + term.Of(at));
            }
        }
    }

    private static void AddTotals(WideBlock sum, WideBlock term, DoubleDouble share)
    {
        for (var at = 0; at < sum.High.Length; at++)
        {
            if (term.High[at] > 0)
            {
                sum.Set(at, sum.Of(at) + (term.Of(at) * share));
            }
        }
    }

    private static (double Smallest, int Reached) Pattern(WideBlock sum, WideBlock term)
    {
        var (smallest, reached) = (double.PositiveInfinity, 0);
        for (var at = 0; at < sum.High.Length; at++)
        {
            smallest = sum.High[at] > 0 ? Math.Min(smallest, sum.High[at]) : smallest;
            reached += term.High[at] > 0 ? 1 : 0;
        }

        return (smallest, reached);
    }

    /// <summary>exp(-q s), as one over a sum of positive terms.</summary>
    private DoubleDouble Decay()
    {
        DoubleDouble sum = 1;
        var term = DoubleDouble.One;
        for (var k = 1; term.High > Cut; k++)
        {
            term = term * mean / k;
            sum += term;
        }

        return DoubleDouble.One / sum;
    }

    /// <summary>What the k-th term of the series adds to totals: ∫ exp(-q u) uᵏ du over the step, divided by sᵏ.</summary>
    private DoubleDouble Share(int k, DoubleDouble decay)
    {
        DoubleDouble sum = 1;
        var term = DoubleDouble.One;
        for (var j = k + 2; term.High > Cut; j++)
        {
            term = term * mean / j;
            sum += term;
        }

        return decay * sum * step / (k + 1);
    }

    /// <summary>What the series of the exponential leaves after some terms.</summary>
    private struct Remainder
    {
        private readonly double mean;
        private double term;
        private int terms;

        public Remainder(double mean)
        {
            this.mean = mean;
            (term, terms, Value) = (mean, 1, double.PositiveInfinity);
        }

        public double Value { get; private set; }

        /// <summary>Takes in the term that comes next; the first call is for the term of power one.</summary>
        public void Next()
        {
            terms++;
            term *= mean / terms;
            Value = term * (1 + 1e-12) / (1 - (mean / (terms + 1)));
        }
    }
}
