using ChainSolve.Numerics.Estimates;
using ChainSolve.Numerics.Iteration;

namespace ChainSolve.Numerics.Absorption;

/// <summary>Searches the time at which a distribution reaches its share. Not safe to share between threads.</summary>
internal sealed class QuantileSearch(PassageDistribution distribution, CancellationToken cancellation)
{
    private const int MostSteps = 400;
    private const double Rounding = 2.3e-16;

    private int steps;
    private bool isProved = true;

    // Surely not later than the quantile, and surely not earlier: the chance is surely below the share at the one, surely not at the other.
    private double surelyEarly;
    private double surelyLate = double.PositiveInfinity;

    public string How => $"a search on the distribution in {steps} steps";

    public Estimate Run()
    {
        var late = Bracket(out var early);
        var best = Close(early, late);
        return Enclose(best);
    }

    /// <summary>Goes on until the share is reached; the time then, and the last one before.</summary>
    private PassagePoint Bracket(out double early)
    {
        early = 0;
        var point = Ask(0.125 / distribution.LargestExit);
        while (point.Excess.Value < 0)
        {
            early = point.Time;
            var hazard = point.Density / point.Staying;
            var guess = early + (Math.Log(point.Staying / point.Tail) / hazard * 1.01);
            var next = double.IsFinite(guess) ? Math.Clamp(guess, 2 * early, 1000 * early) : 8 * early;
            if (!double.IsFinite(next))
            {
                throw new NotConvergedException($"The share is not reached by {early:g3}, the last time that could be asked.");
            }

            point = Ask(next);
        }

        return point;
    }

    /// <summary>Newton's steps, kept between the two ends.</summary>
    private PassagePoint Close(double early, PassagePoint late)
    {
        var (low, high, point, last) = (early, late.Time, late, double.PositiveInfinity);
        while (Math.Abs(point.Excess.Value) > point.Excess.Bound && high - low > high * Rounding)
        {
            var next = NewtonStep(point);
            if (!(next > low && next < high) || Math.Abs(next - point.Time) > 0.7 * last)
            {
                next = low > 0 && high / low > 4 ? Math.Sqrt(low) * Math.Sqrt(high) : low + ((high - low) / 2);
            }

            last = Math.Abs(next - point.Time);
            if (last <= point.Time * Rounding || next <= low || next >= high)
            {
                break;
            }

            point = Ask(next);
            (low, high) = point.Excess.Value < 0 ? (point.Time, high) : (low, point.Time);
        }

        return point;
    }

    private static double NewtonStep(PassagePoint point)
    {
        // The logarithm of what is left is nearly a line where the time is nearly exponential.
        var ratio = point.Excess.Value / point.Tail;
        var log = Math.Abs(ratio) < 1e-4 ? -ratio * (1 + (ratio / 2) + (ratio * ratio / 3)) : Math.Log(1 - ratio);
        return ratio < 1
            ? point.Time + (log * (point.Tail - point.Excess.Value) / point.Density)
            : point.Time - (point.Excess.Value / point.Density);
    }

    /// <summary>Goes outward until the quantile lies surely between two times.</summary>
    private Estimate Enclose(PassagePoint best)
    {
        var time = best.Time;
        var width = ((Math.Abs(best.Excess.Value) + best.Excess.Bound) / best.Density * 1.1) + (time * 2 * Rounding);
        if (!double.IsFinite(width))
        {
            width = time * 1e-9;
        }

        var low = surelyEarly;
        for (var reach = width; time - reach > surelyEarly; reach *= 4)
        {
            if (Ask(time - reach).IsEarly)
            {
                low = time - reach;
                break;
            }
        }

        var high = time + width;
        for (var reach = width; high < surelyLate && !Ask(high).IsLate; reach *= 4)
        {
            high = time + (4 * reach);
            if (!double.IsFinite(high))
            {
                throw new NotConvergedException($"The share is reached at about {time:g3}, but no later time is surely late enough.");
            }
        }

        var bound = Math.Max(time - low, Math.Min(high, surelyLate) - time);
        return new Estimate(time, Math.BitIncrement(bound), isProved);
    }

    private PassagePoint Ask(double time)
    {
        cancellation.ThrowIfCancellationRequested();
        if (++steps > MostSteps)
        {
            throw new NotConvergedException($"The search for the quantile did not end after {MostSteps} steps; it stands at {time:G6}.");
        }

        var point = distribution.At(time);
        isProved &= point.Excess.IsProved;
        if (point.IsEarly)
        {
            surelyEarly = Math.Max(surelyEarly, time);
        }

        if (point.IsLate)
        {
            surelyLate = Math.Min(surelyLate, time);
        }

        return point;
    }
}
