using ChainSolve.Numerics.Arithmetic;

namespace ChainSolve.Numerics.Transient;

/// <summary>
/// Transition matrices of the times h, 2h, 4h, ... and totals of rewards over them, by squaring (Xue and Ye, Numer. Math.
/// 110 (2008); Shao, Gao and Xue, SIAM J. Matrix Anal. Appl. 35 (2014)), each made on first demand.
/// </summary>
/// <remarks>
/// h is a power of two, so that any time is a sum of some of these times and of a rest below h, all of them exact. Not safe
/// to share between threads.
/// </remarks>
internal sealed class TransitionLadder
{
    private readonly WideBlock rewards;
    private readonly bool keepsAll;
    private readonly List<Level?> levels = [];
    private bool isSettled;

    /// <summary>Prepares a ladder; nothing is computed yet.</summary>
    /// <param name="chain">A chain in which something moves.</param>
    /// <param name="rewards">The rewards that are summed, one column each.</param>
    /// <param name="keepsAll">Whether earlier levels can be asked for again; costs their memory.</param>
    public TransitionLadder(ReachedChain chain, WideBlock rewards, bool keepsAll)
    {
        Chain = chain;
        this.rewards = rewards;
        this.keepsAll = keepsAll;
        StepPower = Math.ILogB(ShortStep.Longest) - 1 - Math.ILogB(ShortStep.UniformRate(chain));
    }

    public ReachedChain Chain { get; }

    /// <summary>h is two to this power.</summary>
    public int StepPower { get; }

    /// <summary>How many levels were made.</summary>
    public int LevelCount => levels.Count;

    /// <summary>The matrix and the totals of 2^level·h.</summary>
    public Level At(int level, CancellationToken cancellation)
    {
        while (levels.Count <= level)
        {
            var next = levels.Count == 0 ? Lowest(cancellation) : Above(levels[^1]!, cancellation);
            if (!keepsAll && levels.Count > 0)
            {
                levels[^1] = null;
            }

            levels.Add(next);
        }

        return levels[level] ?? throw new InvalidOperationException("This level was let go.");
    }

    /// <summary>
    /// A time as a sum: which levels it takes, ascending, and the rest below h.
    /// </summary>
    public (IReadOnlyList<int> Levels, double Remainder) Split(double time)
    {
        var taken = new List<int>();
        var rest = time;
        for (var level = time == 0 ? -1 : Math.ILogB(time) - StepPower; level >= 0; level--)
        {
            // Leading bits are taken away one by one: exact.
            var length = Math.ScaleB(1, level + StepPower);
            if (rest >= length)
            {
                taken.Add(level);
                rest -= length;
            }

            if (rest == 0)
            {
                break;
            }
        }

        taken.Reverse();
        return (taken, rest);
    }

    private Level Lowest(CancellationToken cancellation)
    {
        var (matrix, totals) = new ShortStep(Chain, Math.ScaleB(1, StepPower)).All(rewards, cancellation);
        return new Level(matrix, totals);
    }

    private Level Above(Level level, CancellationToken cancellation)
    {
        var totals = level.Totals;
        if (totals.Columns > 0)
        {
            totals = WideProduct.Of(level.Matrix, null, level.Totals, level.Totals.Pattern, isStochastic: false, cancellation);
            AddTo(totals, level.Totals);
        }

        var matrix = level.Matrix;
        if (!isSettled)
        {
            matrix = WideProduct.Of(matrix, null, matrix, matrix.Pattern, isStochastic: true, cancellation);
            isSettled = Settle(matrix);
        }

        return new Level(matrix, totals);
    }

    /// <summary>Adds exact or bounded numbers in place.</summary>
    internal static void AddTo(WideBlock sum, WideBlock term)
    {
        for (var at = 0; at < sum.High.Length; at++)
        {
            sum.Set(at, sum.Of(at) + term.Of(at));
            sum.Bound[at] = (sum.Bound[at] + term.Bound[at] + (sum.High[at] * DoubleDouble.Epsilon * WideBlock.BoundScale)) * (1 + 1e-15);
        }
    }

    /// <summary>
    /// Whether all rows are alike in every digit that counts. Every row of every later matrix is a mean of these rows, so
    /// it lies between them: that is proved, and the bounds are widened to hold for all of them.
    /// </summary>
    private static bool Settle(WideBlock matrix)
    {
        const double Alike = 1e-20;
        var (rows, columns) = (matrix.Rows, matrix.Columns);
        var widths = new double[columns];
        for (var j = 0; j < columns; j++)
        {
            var (least, most, bound) = (matrix.Of(j), matrix.Of(j), matrix.Bound[j]);
            for (var i = 1; i < rows; i++)
            {
                var value = matrix.Of((i * columns) + j);
                least = value < least ? value : least;
                most = value > most ? value : most;
                bound = Math.Max(bound, matrix.Bound[(i * columns) + j]);
            }

            widths[j] = (((most - least).High * WideBlock.BoundScale) + (2 * bound)) * (1 + 1e-14);
            if (widths[j] > least.High * Alike * WideBlock.BoundScale && most.High > 1e-295)
            {
                return false;
            }
        }

        for (var at = 0; at < matrix.Bound.Length; at++)
        {
            matrix.Bound[at] = Math.Max(matrix.Bound[at], widths[at % columns]);
        }

        return true;
    }

    /// <summary>What is known of one time.</summary>
    internal sealed record Level(WideBlock Matrix, WideBlock Totals);
}
