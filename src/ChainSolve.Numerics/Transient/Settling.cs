using ChainSolve.Numerics.Arithmetic;
using ChainSolve.Numerics.Kernels;
using ChainSolve.Numerics.Poisson;

namespace ChainSolve.Numerics.Transient;

/// <summary>
/// A walk of a uniformized chain that ends once the chain has settled. If one step changes every element of a vector by a factor between a and b, then
/// so does every later step, since nothing is negative: what is still to come lies between two geometric sequences, for all rewards and times at once.
/// </summary>
/// <remarks>
/// States that are left for good settle together, at the rate at which the slowest of them are left, or block after block; closed classes
/// settle at the factor one. What a settled block feeds into the rest changes by its factor from step to step: one portion is followed until it has settled
/// too, and counts for all. Blocks that fade faster than the rest are cleared when what they hold can no longer matter, and count as
/// lost. The factors are those of Collatz (Math. Z. 48 (1942), from memory) for non-negative matrices. Not safe to share between threads.
/// </remarks>
internal sealed class Settling
{
    // What the factors may leave open at the longest time, relative.
    private const double Goal = 1e-16;

    // What is cleared may change a value by this much, relative.
    private const double Clearable = 1e-19;

    // The logarithm of what is below all numbers of interest.
    private const double Gone = 800;

    // No value below it needs relative accuracy.
    private const double Negligible = 1e-290;

    // Each block that is cut off alone doubles the number of flows.
    private const int MostBlocks = 6;

    // A block is cut off alone only where so many times the steps taken are still to come.
    private const double Worthwhile = 10;

    private const long FirstLook = 16;

    private readonly TransientProblem problem;
    private readonly UniformizedStep step;
    private readonly TimeSums[] sums;
    private readonly double[][] rewards;
    private readonly TransientBlocks blocks;
    private readonly DriftMeter meter;
    private readonly Queue<Flow> feeds = new();
    private readonly Patience patience;
    private readonly Action<long> report;
    private long taken;
    private long nextLook = FirstLook;

    /// <summary>Prepares a walk.</summary>
    /// <param name="problem">What is asked.</param>
    /// <param name="reached">The states that count and can be reached.</param>
    /// <param name="step">The vectors, of two doubles.</param>
    /// <param name="sums">What the times gather.</param>
    /// <param name="patience">When to give up.</param>
    /// <param name="report">Told the number of steps.</param>
    /// <param name="cancellation">Stops the search for blocks.</param>
    public Settling(
        TransientProblem problem, bool[] reached, UniformizedStep step, TimeSums[] sums, Patience patience, Action<long> report, CancellationToken cancellation)
    {
        (this.problem, this.step, this.sums, this.patience, this.report) = (problem, step, sums, patience, report);
        rewards = [.. problem.Rates, .. problem.Totals];
        meter = new DriftMeter(step);
        blocks = new TransientBlocks(problem.Generator, reached, cancellation);
    }

    /// <summary>The mass that was cleared.</summary>
    public double Cleared { get; private set; }

    /// <summary>Whether the walk ended before the last time.</summary>
    public bool IsSettled { get; private set; }

    /// <summary>Walks until every time has all it needs; the number of steps taken.</summary>
    public long Run()
    {
        var open = sums.ToList();
        var last = Follow(new Flow(0, [], open, [], new bool[blocks.Count]));
        while (feeds.TryDequeue(out var flow))
        {
            flow.Portion!.Value.High.CopyTo(step.Vectors.Read);
            flow.Portion.Value.Low.CopyTo(step.Vectors.FromLow, StepVectors.Lanes);
            step.Refresh();
            nextLook = flow.FirstStep + 1;
            last = Math.Max(last, Follow(flow));
        }

        foreach (var sum in open.Where(s => IsSettled && !s.IsDone))
        {
            sum.Close(last);
        }

        return taken;
    }

    /// <summary>Follows a flow until it has settled, or to its last time; the step reached.</summary>
    private long Follow(Flow flow)
    {
        for (var steps = flow.FirstStep; ; steps++)
        {
            flow.Add(steps, step, Earned);
            if (steps >= flow.Horizon)
            {
                return steps;
            }

            report(taken);
            step.Advance();
            taken++;
            if (steps + 1 >= nextLook)
            {
                nextLook = steps + 1 + Math.Max(FirstLook, (steps + 1 - flow.FirstStep) / 10);
                if (HasSettled(flow, steps + 1))
                {
                    IsSettled = true;
                    return steps + 1;
                }
            }
        }
    }

    /// <summary>
    /// Looks at the vector after some steps, and takes in what has settled; whether nothing is left to follow. After a change the next step
    /// has to be seen before anything else can be told.
    /// </summary>
    private bool HasSettled(Flow flow, long steps)
    {
        var ahead = Math.Max(0, flow.Horizon - steps);
        var first = flow.FirstBlock;
        if (first == blocks.Count)
        {
            var closed = meter.Of(blocks.IsClosed);
            if (!IsNarrow(closed, ahead))
            {
                return false;
            }

            Take(flow, steps, closed, Earned(), step.Vector);
            return true;
        }

        if (ClearFaded(flow, ahead))
        {
            return Changed(steps);
        }

        var left = meter.Of(blocks.States(first..blocks.Count));
        if (IsNarrow(left, ahead))
        {
            Cut(flow, first..blocks.Count, steps, left);
            return Changed(steps);
        }

        if (flow.BlocksLeft is > 1 and <= MostBlocks && ahead > Worthwhile * steps && meter.Of(blocks.States(first..(first + 1))) is var alone && IsNarrow(alone, ahead))
        {
            Cut(flow, first..(first + 1), steps, alone);
            return Changed(steps);
        }

        return false;
    }

    private bool Changed(long steps)
    {
        step.Refresh();
        nextLook = steps + 1;
        return step.Mass == 0;
    }

    /// <summary>Takes in all that blocks will still hold, has what they feed followed later, and takes them out of the vector.</summary>
    private void Cut(Flow flow, Range range, long steps, Drift drift)
    {
        var held = new double[step.Vectors.Count];
        foreach (var i in blocks.States(range))
        {
            held[i] = step.Vectors.Read[i];
        }

        var next = Take(flow, steps, drift, [.. rewards.Select(r => LongSum.Dot(held, r))], held);
        if (blocks.FedBy(step.Vectors, range, step.Inverse) is { } portion)
        {
            feeds.Enqueue(next with { Portion = portion, IsCleared = Without(flow, range) });
        }

        blocks.Clear(step.Vectors, range);
        Array.Fill(flow.IsCleared, true, range.Start.Value, range.End.Value - range.Start.Value);
    }

    private static bool[] Without(Flow flow, Range range)
    {
        var cleared = (bool[])flow.IsCleared.Clone();
        Array.Fill(cleared, true, 0, range.End.Value);
        return cleared;
    }

    /// <summary>Adds a settled vector with all that comes after it to every open time; the flow of what it feeds.</summary>
    private static Flow Take(Flow flow, long steps, Drift drift, double[] earned, ReadOnlySpan<double> vector)
    {
        TimeSums[] open = [.. flow.Open.Where(s => flow.Portion is not null || !s.IsDone)];
        Drift[] drifts = [.. flow.Drifts, drift];
        SettledWeights[] weights = [.. open.Select(s => new SettledWeights(s.Mean, drifts, s.Window))];
        for (var s = 0; s < open.Length; s++)
        {
            open[s].AddSettled(weights[s].After(steps), earned, vector);
        }

        return new Flow(steps + 1, drifts, open, weights, flow.IsCleared);
    }

    /// <summary>Clears blocks that nothing feeds any more and that hold next to nothing; whether there were any.</summary>
    private bool ClearFaded(Flow flow, double ahead)
    {
        var allowance = Allowance(flow, ahead);
        var isFed = new bool[blocks.Count];
        var cleared = 0.0;
        var isAny = false;
        for (var b = 0; b < blocks.Count; b++)
        {
            if (flow.IsCleared[b])
            {
                continue;
            }

            var mass = blocks.Mass(step.Vectors.Read, b);
            if (isFed[b] || mass > allowance - cleared)
            {
                blocks.MarkFed(b, isFed);
                continue;
            }

            cleared += mass;
            (flow.IsCleared[b], isAny) = (true, true);
            blocks.Clear(step.Vectors, b..(b + 1));
        }

        Cleared += cleared * flow.Portions;
        return isAny;
    }

    /// <summary>How much may be cleared: next to nothing of what every reward, and every probability that is wanted, will still earn, as far as it can be told now.</summary>
    private double Allowance(Flow flow, double ahead)
    {
        var vector = step.Vectors.Read;
        var survival = blocks.Survival(step.Vectors, flow.IsCleared, ahead);
        var least = 1.0;
        for (var r = 0; r < rewards.Length; r++)
        {
            if (step.Largest(r) == 0)
            {
                continue;
            }

            LongSum lasting = default;
            for (var i = 0; i < vector.Length; i++)
            {
                lasting.AddProduct(vector[i], rewards[r][i] * survival[i]);
            }

            least = Math.Min(least, Math.Max(lasting.Value, Negligible) / step.Largest(r));
        }

        for (var i = 0; problem.WantsDistributions && i < vector.Length; i++)
        {
            least = vector[i] > 0 ? Math.Min(least, Math.Max(vector[i] * survival[i], Negligible)) : least;
        }

        return Clearable * least;
    }

    private double[] Earned() => [.. rewards.Select((_, r) => step.Earned(r))];

    private bool IsNarrow(Drift drift, double ahead)
    {
        // What shrinks is gone at some time, and what is open then matters no more. Nothing is narrower than the rounding.
        var change = Math.Min(Math.Abs(drift.Low), Math.Abs(drift.High));
        var goal = (Goal / Math.Max(1, Math.Min(ahead, Gone / change))) + (1.1 * meter.Noise) + (2 * DriftMeter.Rounding * (Math.Abs(drift.Low) + Math.Abs(drift.High)));
        patience.Check(taken, drift.Width, goal, ahead);
        return double.IsFinite(drift.Width) && drift.Width <= goal;
    }
}
