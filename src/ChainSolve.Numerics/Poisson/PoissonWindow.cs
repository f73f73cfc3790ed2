using ChainSolve.Numerics.Arithmetic;

namespace ChainSolve.Numerics.Poisson;

/// <summary>The probabilities P(N = k) of a Poisson number N for k from <see cref="Left"/> to <see cref="Right"/>, and its tails P(N &gt; k).</summary>
/// <remarks>
/// The weights are walked both ways from the mode by their recurrence in two doubles, down to where nothing is left that
/// could change the 32nd digit of their sum, and divided by that sum; no exponential is evaluated. So every weight has a
/// relative error below <see cref="RelativeError"/> at any mean, and the tails are summed from the right, small first.
/// The idea of windows is that of Fox and Glynn, CACM 31 (1988) 440-445; what is cut off is bounded by geometric series.
/// Takes time and memory in proportion to the square root of the mean. Immutable.
/// </remarks>
internal sealed class PoissonWindow
{
    /// <summary>
    /// The relative error of every weight above 1e-290, and of every tail above it apart from <see cref="LeftOut"/>.
    /// </summary>
    public const double RelativeError = 1.2e-16;

    /// <summary>The largest mean; its deepest window has some millions of weights.</summary>
    public const double LargestMean = 1e10;

    /// <summary>Cuts so deep that what is left out is below any value of interest.</summary>
    public const double Deep = 1e-300;

    // What may be left out of the sum by which the weights are divided.
    private const double SumAccuracy = 1e-34;

    private readonly double[] weights;
    private readonly double[] tails;

    private PoissonWindow(DoubleDouble mean, long left, double[] weights, double[] tails, double leftOut)
    {
        Mean = mean;
        Left = left;
        this.weights = weights;
        this.tails = tails;
        LeftOut = leftOut;
    }

    public DoubleDouble Mean { get; }

    /// <summary>The first k of the window.</summary>
    public long Left { get; }

    /// <summary>The last k of the window.</summary>
    public long Right => Left + weights.Length - 1;

    /// <summary>A bound on P(N &lt; Left), and on P(N &gt; Right).</summary>
    public double LeftOut { get; }

    /// <summary>Finds the window that leaves out at most half of a probability on either side.</summary>
    /// <param name="mean">The mean, not negative, up to <see cref="LargestMean"/>.</param>
    /// <param name="leaveOut">The probability that may be left out; not below 1e-300.</param>
    /// <param name="cancellation">Looked at from time to time.</param>
    public static PoissonWindow Of(DoubleDouble mean, double leaveOut = Deep, CancellationToken cancellation = default)
    {
        ArgumentOutOfRangeException.ThrowIfNegative(mean.High, nameof(mean));
        ArgumentOutOfRangeException.ThrowIfGreaterThan(mean.High, LargestMean, nameof(mean));
        ArgumentOutOfRangeException.ThrowIfLessThan(leaveOut, Deep);
        var mode = (long)Math.Floor(mean.High);
        var below = Walk(mean, mode, -1, leaveOut / 2, cancellation);
        var above = Walk(mean, mode, 1, leaveOut / 2, cancellation);

        // Small terms first: both sides from their far ends towards the mode.
        var sum = SumOf(below.Terms) + SumOf(above.Terms) + 1.0;
        var left = mode - below.Kept;
        var weights = new double[below.Kept + above.Kept + 1];
        var tails = new double[weights.Length];
        DoubleDouble tail = 0;
        for (var i = above.Terms.Count - 1; i >= above.Kept; i--)
        {
            tail += above.Terms[i];
        }

        for (var i = weights.Length - 1; i >= 0; i--)
        {
            var offset = i - below.Kept;
            var term = offset == 0 ? DoubleDouble.One : offset > 0 ? above.Terms[offset - 1] : below.Terms[-offset - 1];
            weights[i] = (term / sum).High;
            tails[i] = (tail / sum).High;
            tail += term;
        }

        return new PoissonWindow(mean, left, weights, tails, leaveOut / 2);
    }

    /// <summary>P(N = k); 0 outside of the window.</summary>
    public double Weight(long k) => k < Left || k > Right ? 0 : weights[k - Left];

    /// <summary>P(N &gt; k); 1 below the window, and above it what was left out at most.</summary>
    public double Tail(long k) => k < Left ? 1 : k > Right ? LeftOut : tails[k - Left];

    /// <summary>A bound on the sum of P(N &gt; j) over all j &gt; k; infinite below the mean.</summary>
    /// <remarks>P(N &gt; j + 1) is at most mean/(j + 2) times P(N &gt; j): a geometric series.</remarks>
    public double TailsBeyond(long k)
    {
        var ratio = Mean.High / (k + 3.0);
        return ratio < 1 ? Tail(k + 1) / (1 - ratio) * (1 + 1e-12) : double.PositiveInfinity;
    }

    /// <summary>
    /// The weights beside the mode, relative to that of the mode, in the order of the distance from it, as far as the sum
    /// needs them or the window does; and how many of them belong to the window.
    /// </summary>
    private static (List<DoubleDouble> Terms, int Kept) Walk(
        DoubleDouble mean, long mode, int direction, double leaveOut, CancellationToken cancellation)
    {
        var terms = new List<DoubleDouble>();
        var term = DoubleDouble.One;
        DoubleDouble sum = 1;
        var kept = -1;
        for (var k = mode; ; k += direction)
        {
            if (terms.Count % 65536 == 0)
            {
                cancellation.ThrowIfCancellationRequested();
            }

            // What lies beyond k is at most the next term times a geometric series; the sum so far is a lower bound.
            var next = direction > 0 ? term * mean / (k + 1) : k == 0 ? 0 : term * (double)k / mean;
            var ratio = direction > 0 ? mean.High / (k + 2) : (k - 1) / mean.High;
            var beyond = next.High == 0 ? 0 : next.High / Math.Max(1 - ratio, 1e-300) / sum.High * (1 + 1e-12);
            if (kept < 0 && beyond <= leaveOut)
            {
                kept = terms.Count;
            }

            if (next.High == 0 || (kept >= 0 && beyond <= Math.Min(leaveOut, SumAccuracy)))
            {
                return (terms, kept < 0 ? terms.Count : kept);
            }

            term = next;
            sum += term;
            terms.Add(term);
        }
    }

    private static DoubleDouble SumOf(List<DoubleDouble> terms)
    {
        DoubleDouble sum = 0;
        for (var i = terms.Count - 1; i >= 0; i--)
        {
            sum += terms[i];
        }

        return sum;
    }
}
