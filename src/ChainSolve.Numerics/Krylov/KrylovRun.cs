using System.Globalization;
using ChainSolve.Numerics.Estimates;
using ChainSolve.Numerics.Iteration;
using ChainSolve.Numerics.Kernels;
using ChainSolve.Numerics.Transient;

namespace ChainSolve.Numerics.Krylov;

/// <summary>One walk through time from subspace to subspace, which serves all times and rewards of a problem. Not safe to share between threads.</summary>
internal sealed class KrylovRun
{
    /// <summary>The largest number of vectors of a subspace.</summary>
    public const int MostVectors = 30;

    // What one restart loses to rounding, of a mass of one.
    private const double RestartRounding = 4e-14;

    // What an expected step of the fastest state loses: the rates of the small matrix are rounded, and so is what lies beyond the basis. A subspace may leave out as much.
    private const double StepRounding = 4e-15;

    private const int MostRestarts = 20_000;

    private readonly TransientProblem problem;
    private readonly bool[] reached;
    private readonly SolveContext context;
    private readonly UniformizedStep step;
    private readonly KrylovBasis basis;
    private readonly double[][] rewards;
    private readonly double[] sofar;
    private readonly double[] vector;
    private readonly Dictionary<double, TimeAnswer> answers = [];
    private double time;
    private double error;

    public KrylovRun(TransientProblem problem, bool[] reached, SolveContext context)
    {
        (this.problem, this.reached, this.context) = (problem, reached, context);
        var kernel = StepKernels.For(problem.Generator.Columns, reached, MostVectors * 10, context.Cancellation);
        step = new UniformizedStep(problem.Generator, problem.Start, reached, [], isWide: false, kernel, context.Threads, context.Cancellation);
        basis = new KrylovBasis(reached.Length, Math.Min(MostVectors, reached.Count(r => r)));
        rewards = [.. problem.Rates.Concat(problem.Totals).Select(r => r.Select((x, i) => reached[i] ? x : 0).ToArray())];
        sofar = new double[problem.Totals.Count];
        vector = step.Vector.ToArray();
    }

    /// <summary>Goes through all times.</summary>
    /// <exception cref="NotConvergedException">The steps stay too short.</exception>
    public TransientResult Run()
    {
        double[] times = [.. problem.Times.Where(t => t > 0).Distinct().Order()];
        var restarts = 0;
        for (var next = 0; next < times.Length; restarts++)
        {
            if (restarts == MostRestarts)
            {
                throw new NotConvergedException(string.Create(
                    CultureInfo.InvariantCulture, $"after {restarts} subspaces the time is {time:g3} of {times[^1]:g3}: the chain is too stiff, or the time too long"));
            }

            context.Progress?.Report(new SolveProgress("krylov", restarts, 0, string.Create(CultureInfo.InvariantCulture, $"time {time:g3} of {times[^1]:g3}")));
            if (LaneVectors.OneNorm(vector) < 1e-290)
            {
                Array.Clear(vector);
                AnswerRest(times[next..]);
                break;
            }

            basis.Make(vector, Apply, context.Cancellation);
            var reach = new SubspaceReach(basis, step.Rate.High);
            var found = reach.Find(times[^1] - time, Rounding);
            var products = rewards.Select(r => Products(r)).ToArray();
            for (; next < times.Length && times[next] <= (time + found.Length) * (1 + 1e-15); next++)
            {
                Answer(times[next], reach.At(times[next] - time), products, found.Error);
            }

            Move(reach.At(found.Length), found, products);
        }

        if (problem.Times.Contains(0))
        {
            answers[0] = TimeAnswer.Still(problem, 0);
        }

        return TimeAnswer.Gather(
            problem.Times, answers, problem.WantsDistributions,
            string.Create(CultureInfo.InvariantCulture, $"krylov subspaces of up to {MostVectors} vectors, {restarts} of them"));
    }

    private double Rounding(double length) => RestartRounding + (StepRounding * step.Rate.High * length);

    private void Apply(double[] from, double[] to)
    {
        from.CopyTo(step.Vectors.Read);
        step.Advance();
        step.Vectors.Read.CopyTo(to);
    }

    private double[] Products(double[] reward) => [.. Enumerable.Range(0, basis.Count).Select(j => LaneVectors.Dot(basis[j], reward))];

    private void Move((double[] At, double[] UpTo) weights, (double Length, double Error) found, double[][] products)
    {
        for (var r = 0; r < sofar.Length; r++)
        {
            sofar[r] += basis.Length * LaneVectors.Dot(weights.UpTo, products[problem.Rates.Count + r]);
        }

        Combine(weights.At, vector);
        error += found.Error + (Rounding(found.Length) * LaneVectors.OneNorm(vector));
        time += found.Length;
    }

    private void Combine(double[] weights, double[] to)
    {
        Array.Clear(to);
        for (var j = 0; j < basis.Count; j++)
        {
            LaneVectors.AddTo(to, basis.Length * weights[j], basis[j]);
        }
    }

    private void Answer(double at, (double[] At, double[] UpTo) weights, double[][] products, double ahead)
    {
        var off = error + ahead + (Rounding(at - time) * LaneVectors.OneNorm(vector));
        double[]? distribution = null;
        if (problem.WantsDistributions)
        {
            distribution = new double[reached.Length];
            Combine(weights.At, distribution);
        }

        var rateCount = problem.Rates.Count;
        answers[at] = new TimeAnswer(
            [.. problem.Rates.Select((_, r) => Bounded(basis.Length * LaneVectors.Dot(weights.At, products[r]), off, Largest(r)))],
            [.. problem.Totals.Select((_, r) => Bounded(
                sofar[r] + (basis.Length * LaneVectors.Dot(weights.UpTo, products[rateCount + r])), off * at, Largest(rateCount + r)))],
            distribution is null ? null : [.. distribution.Select(p => Math.Max(0, p))],
            distribution is null ? null : [.. reached.Select(r => r ? off : 0)]);
    }

    /// <summary>Nothing is left of the mass.</summary>
    private void AnswerRest(double[] times)
    {
        foreach (var at in times)
        {
            answers[at] = new TimeAnswer(
                [.. problem.Rates.Select((_, r) => Bounded(0, error, Largest(r)))],
                [.. problem.Totals.Select((_, r) => Bounded(sofar[r], error * at, Largest(problem.Rates.Count + r)))],
                problem.WantsDistributions ? new double[reached.Length] : null,
                problem.WantsDistributions ? [.. reached.Select(r => r ? error : 0)] : null);
        }
    }

    private double Largest(int reward) => rewards[reward].Max();

    private static Estimate Bounded(double value, double off, double largest) =>
        largest == 0 ? Estimate.Zero : new Estimate(Math.Max(0, value), (off * largest) + (Math.Abs(value) * 1e-15), false);
}
