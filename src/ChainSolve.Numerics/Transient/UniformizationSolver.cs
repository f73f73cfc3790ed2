using ChainSolve.Numerics.Iteration;
using ChainSolve.Numerics.Kernels;
using ChainSolve.Numerics.Poisson;

namespace ChainSolve.Numerics.Transient;

/// <summary>
/// Uniformization (Jensen 1953): the chain moves at the points of a Poisson process, and one pass over its vectors serves all
/// times and rewards.
/// </summary>
/// <remarks>
/// For chains of any size whose fastest state sees up to some millions of events in the longest time. All terms are
/// non-negative and all bounds proved. Vectors are of two doubles, so that every value is right to about three roundings,
/// unless that would take long and one double is good enough for the tolerance. Safe to share between threads.
/// </remarks>
public sealed class UniformizationSolver : ITransientSolver
{
    // Up to about a second vectors are always of two doubles.
    private const double AffordableOperations = 8e9;

    private const double Rounding = 1.2e-16;

    // Beyond so many steps the losses of one double add up, and most chains settle earlier.
    private const double MostPlainSteps = 20_000;

    /// <inheritdoc/>
    public string Name => "uniformization";

    /// <summary>How many operations are worth it before another method is tried.</summary>
    internal double MostWork { get; init; } = double.PositiveInfinity;

    /// <inheritdoc/>
    public double Cost(TransientProblem problem)
    {
        ArgumentNullException.ThrowIfNull(problem);
        var size = ProblemSize.Estimate(problem);
        var mean = LongestMean(size, problem.Times);
        if (!double.IsFinite(mean))
        {
            return double.PositiveInfinity;
        }

        // Before anything is laid out: as on rows.
        var cost = RowKernel.UsualCost;
        var isWide = IsWide(problem, size, mean, cost, SolveContext.Default.Tolerance);
        var rewards = problem.Times.Count * (problem.Rates.Count + problem.Totals.Count) * 10.0;
        var vectors = problem.WantsDistributions ? 10.0 * problem.Generator.StateCount * problem.Times.Count : 0;
        return (StepCount(mean) * ((Entries(problem, size) * (isWide ? cost.Wide : cost.Plain)) + rewards)) + ((StepCount(mean) - mean) * vectors);
    }

    /// <inheritdoc/>
    public TransientResult Solve(TransientProblem problem, SolveContext context)
    {
        ArgumentNullException.ThrowIfNull(context);
        ProblemCheck.Check(problem);
        ProblemCheck.Range(problem, problem.Times.DefaultIfEmpty(0).Max());
        var reached = ReachedChain.Reach(problem.Generator, problem.Start, problem.Alive);
        var size = ProblemSize.Of(problem.Generator, reached);
        ReachedChain.CheckRange(size.LargestExit);
        if (size.LargestExit == 0 || problem.Times.All(t => t == 0))
        {
            var answers = problem.Times.Distinct().ToDictionary(t => t, t => TimeAnswer.Still(problem, t));
            return TimeAnswer.Gather(problem.Times, answers, problem.WantsDistributions, "nothing moves");
        }

        var mean = LongestMean(size, problem.Times);
        var kernel = StepKernels.For(problem.Generator.Columns, reached, (long)Math.Min(StepCount(mean), 1e15), context.Cancellation);
        var isWide = IsWide(problem, size, mean, kernel.Cost, context.Tolerance);
        var stepWork = Entries(problem, size) * (isWide ? kernel.Cost.Wide : kernel.Cost.Plain);
        var work = mean > PoissonWindow.LargestMean ? Math.Min(MostWork, PoissonWindow.LargestMean / 10 * stepWork) : MostWork;
        return new UniformizationPass(problem, reached, isWide, kernel, context, new Patience(work, stepWork)).Run();
    }

    /// <summary>Whether vectors of two doubles would be taken: where they take little, and where one would be too rough.</summary>
    internal static bool IsWide(TransientProblem problem) =>
        ProblemSize.Estimate(problem) is var size
        && IsWide(problem, size, LongestMean(size, problem.Times), RowKernel.UsualCost, SolveContext.Default.Tolerance);

    private static bool IsWide(TransientProblem problem, ProblemSize size, double mean, StepCost cost, double tolerance)
    {
        // One double loses a rounding or so an entry and a step.
        var loss = StepCount(mean) * ((size.Transitions / Math.Max(1.0, size.States)) + 5) * Rounding;
        return StepCount(mean) > MostPlainSteps || StepCount(mean) * Entries(problem, size) * cost.Wide <= AffordableOperations || loss * 4 > tolerance;
    }

    private static double Entries(TransientProblem problem, ProblemSize size) => size.Transitions + (3.0 * problem.Generator.StateCount);

    private static double LongestMean(ProblemSize size, IReadOnlyList<double> times) =>
        UniformizedStep.Margin * size.LargestExit * times.DefaultIfEmpty(0).Max();

    private static double StepCount(double mean) => mean + (9 * Math.Sqrt(mean)) + 30;
}
