using ChainSolve.Numerics.Arithmetic;
using ChainSolve.Numerics.Estimates;

namespace ChainSolve.Numerics.Transient;

/// <summary>What was found for one time.</summary>
/// <param name="Rates">By reward.</param>
/// <param name="Totals">By reward.</param>
/// <param name="Distribution">By state; null where it is not wanted.</param>
/// <param name="Bounds">The bounds of the distribution; null where it is not wanted.</param>
internal sealed record TimeAnswer(Estimate[] Rates, Estimate[] Totals, double[]? Distribution, double[]? Bounds)
{
    /// <summary>The answer where nothing has moved: at time zero, or where no state of the start is ever left.</summary>
    public static TimeAnswer Still(TransientProblem problem, double time)
    {
        var start = problem.Start;
        bool Counts(int i) => problem.Alive is null || problem.Alive[i];
        Estimate Earned(double[] reward, double factor)
        {
            DoubleDouble sum = 0;
            var terms = 0;
            for (var i = 0; i < start.Length && factor > 0; i++)
            {
                if (start[i] > 0 && reward[i] > 0 && Counts(i))
                {
                    sum += DoubleDouble.Product(start[i], reward[i]);
                    terms++;
                }
            }

            sum *= factor;
            var bound = Math.Abs(sum.Low) + (sum.High * (terms + 2) * DoubleDouble.Epsilon);
            return terms == 0 ? Estimate.Zero : new Estimate(sum.High, Math.BitIncrement(bound) + ((terms + 1) * factor * 2 * double.Epsilon), true);
        }

        return new TimeAnswer(
            [.. problem.Rates.Select(r => Earned(r, 1))],
            [.. problem.Totals.Select(r => Earned(r, time))],
            problem.WantsDistributions ? [.. start.Select((p, i) => Counts(i) ? p : 0)] : null,
            problem.WantsDistributions ? new double[start.Length] : null);
    }

    /// <summary>The answers of several times as one result, in the order of the times.</summary>
    public static TransientResult Gather(
        IReadOnlyList<double> times, Dictionary<double, TimeAnswer> answers, bool wantsDistributions, string how) => new()
        {
            Rates = [.. times.Select(t => (Estimate[])answers[t].Rates.Clone())],
            Totals = [.. times.Select(t => (Estimate[])answers[t].Totals.Clone())],
            Distributions = wantsDistributions ? [.. times.Select(t => (double[])answers[t].Distribution!.Clone())] : null,
            DistributionBounds = wantsDistributions ? [.. times.Select(t => (double[])answers[t].Bounds!.Clone())] : null,
            How = how,
        };
}
