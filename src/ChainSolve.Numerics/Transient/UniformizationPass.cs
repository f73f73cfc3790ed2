using System.Globalization;
using ChainSolve.Numerics.Arithmetic;
using ChainSolve.Numerics.Estimates;
using ChainSolve.Numerics.Iteration;
using ChainSolve.Numerics.Kernels;
using ChainSolve.Numerics.Poisson;

namespace ChainSolve.Numerics.Transient;

/// <summary>One pass over the vectors of a uniformized chain that serves all times of a problem.</summary>
internal sealed class UniformizationPass
{
    private const double Rounding = 1.2e-16;
    private const long ReportSteps = 256;

    // Below it, finding the classes would cost more than could be saved.
    private const double FewestSteps = 1000;

    private readonly TransientProblem problem;
    private readonly bool[] reached;
    private readonly SolveContext context;
    private readonly UniformizedStep step;
    private readonly DoubleDouble mass;
    private readonly bool isKept;
    private readonly Patience patience;
    private double horizon;

    public UniformizationPass(
        TransientProblem problem, bool[] reached, bool isWide, IStepKernel kernel, SolveContext context, Patience? patience = null)
    {
        this.patience = patience ?? new Patience(double.PositiveInfinity, 1);
        this.problem = problem;
        this.reached = reached;
        this.context = context;

        // In one double the mass drifts; where none is lost it is known, and what it seems to be tells the drift.
        isKept = !isWide && !Loses();
        double[][] ones = isKept ? [Ones()] : [];
        double[][] rates = [.. problem.Rates, .. ones];
        double[][] totals = [.. problem.Totals, .. ones];
        (RateCount, TotalCount) = (rates.Length, totals.Length);
        step = new UniformizedStep(problem.Generator, problem.Start, reached, [.. rates, .. totals], isWide, kernel, context.Threads, context.Cancellation);
        for (var i = 0; i < reached.Length; i++)
        {
            mass += reached[i] ? problem.Start[i] : 0;
        }
    }

    private int RateCount { get; }

    private int TotalCount { get; }

    public TransientResult Run()
    {
        double[] times = [.. problem.Times.Where(t => t > 0).Distinct().Order()];
        TimeSums[] sums = [.. times.Select(t => new TimeSums(
            step.Rate * t, step, RateCount, TotalCount, problem.WantsDistributions ? reached : null, context.Cancellation))];
        horizon = sums[^1].Horizon;
        var (steps, isSettled, cleared) = Walk(sums);
        var lost = Lost(steps, isSettled) + cleared;
        var answers = new Dictionary<double, TimeAnswer>();
        for (var i = 0; i < times.Length; i++)
        {
            sums[i].Finish();
            answers[times[i]] = Read(times[i], sums[i], lost);
        }

        if (problem.Times.Contains(0))
        {
            answers[0] = TimeAnswer.Still(problem, 0);
        }

        var mean = (step.Rate * times[^1]).High;
        var shown = mean.ToString(mean is < 100 or >= 1e9 ? "g3" : "F0", CultureInfo.InvariantCulture);
        return TimeAnswer.Gather(
            problem.Times, answers, problem.WantsDistributions,
            $"uniformization in {(step.IsWide ? "two doubles" : "one double")}, q t = {shown}, {steps} steps{(isSettled ? ", settled" : "")}");
    }

    /// <summary>Goes on until no time needs more; the number of steps taken.</summary>
    private (long Steps, bool IsSettled, double Cleared) Walk(TimeSums[] sums)
    {
        if (step.IsWide && sums[^1].Mean.High > FewestSteps)
        {
            var settling = new Settling(problem, reached, step, sums, patience, Report, context.Cancellation);
            return (settling.Run(), settling.IsSettled, settling.Cleared);
        }

        var first = 0;
        for (long k = 0; ; k++)
        {
            for (var i = first; i < sums.Length; i++)
            {
                if (!sums[i].IsDone)
                {
                    sums[i].Add(k);
                }
            }

            while (first < sums.Length && sums[first].IsDone)
            {
                first++;
            }

            if (first == sums.Length)
            {
                return (k, false, 0);
            }

            Report(k);
            step.Advance();
        }
    }

    private void Report(long k)
    {
        if (k % ReportSteps == 0)
        {
            context.Progress?.Report(new SolveProgress("uniformization", k, (long)horizon, ""));
        }
    }

    private TimeAnswer Read(double time, TimeSums sums, double lost)
    {
        // The steps; the weight or tail, the vector as one double, its product with a reward, and the sum over steps; and
        // what the rounding of the mean does to a weight or a tail, which is at most |k - mean| or k + 1 times it.
        var relative = ((sums.LastStep * step.StepError) + (6 * Rounding) + ((sums.Width + sums.LastStep + 10) * 24 * DoubleDouble.Unit)) * (1 + 1e-6);
        var left = (sums.Left + PoissonWindow.Deep + lost) * (1 + 1e-6);
        var leftOfTotals = ((sums.LeftOfTotals * step.Inverse) + (lost * time) + (PoissonWindow.Deep * (time + (sums.LastStep * step.Inverse)))) * (1 + 1e-6);
        var (rateScale, totalScale) = (1.0, step.Inverse);
        if (isKept)
        {
            rateScale = mass.High / sums.Rate(RateCount - 1);
            totalScale = mass.High * time / sums.Total(TotalCount - 1);
            relative = (2 * relative) + (4 * Rounding);
        }

        relative += 2 * Rounding;
        Estimate Bounded(double value, double slack, double largest, double absolute) =>
            largest == 0 ? Estimate.Zero : new Estimate(value, Math.BitIncrement((value * relative) + (slack * (1 + 1e-6)) + (largest * absolute)), true);
        var answer = new TimeAnswer(
            [.. problem.Rates.Select((_, r) => Bounded(sums.Rate(r) * rateScale, sums.RateSlack(r), step.Largest(r), left))],
            [.. problem.Totals.Select((_, r) => Bounded(sums.Total(r) * totalScale, sums.TotalSlack(r) * totalScale, step.Largest(RateCount + r), leftOfTotals))],
            sums.Distribution,
            problem.WantsDistributions ? new double[reached.Length] : null);
        for (var i = 0; problem.WantsDistributions && i < reached.Length; i++)
        {
            answer.Distribution![i] *= rateScale;
            answer.Bounds![i] = reached[i] ? Bounded(answer.Distribution[i], sums.Slack(i), 1, left).Bound : 0;
        }

        return answer;
    }

    /// <summary>
    /// The mass that was dropped: elements below <see cref="StepScale.Flushed"/>, and what underflowed above them; and the same at all steps that
    /// a settled walk did not take.
    /// </summary>
    private double Lost(long steps, bool isSettled) =>
        (step.DroppedCount * StepScale.Flushed)
        + (isSettled && step.DroppedCount > 0 ? horizon * reached.Length * StepScale.Flushed : 0)
        + ((isSettled ? horizon : steps) * reached.Length * (step.MostInto + 2) * Math.ScaleB(1 + step.Inverse, -1070));

    private bool Loses()
    {
        var rows = problem.Generator.Rows;
        for (var i = 0; i < reached.Length; i++)
        {
            for (var e = rows.Offsets[i]; reached[i] && e < rows.Offsets[i + 1]; e++)
            {
                if (rows.Values[e] > 0 && !reached[rows.Targets[e]])
                {
                    return true;
                }
            }
        }

        return false;
    }

    private double[] Ones()
    {
        var ones = new double[reached.Length];
        Array.Fill(ones, 1);
        return ones;
    }
}
