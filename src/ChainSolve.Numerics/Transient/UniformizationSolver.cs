using ChainSolve.Numerics.Iteration;
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
    // Operations for one entry of the generator in one step, with vectors of one double and of two.
    private const double PlainOperations = 2;
    private const double WideOperations = 10;

    // Up to about a second in two doubles they are always taken.
    internal const double AffordableOperations = 3e9;

    private const double Rounding = 1.2e-16;

    /// <inheritdoc/>
    public string Name => "uniformization";

    /// <inheritdoc/>
    public double Cost(TransientProblem problem)
    {
        ArgumentNullException.ThrowIfNull(problem);
        var size = ProblemSize.Of(problem);
        var mean = LongestMean(size, problem.Times);
        if (!(mean <= PoissonWindow.LargestMean))
        {
            return double.PositiveInfinity;
        }

        var entries = size.Transitions + (3.0 * problem.Generator.StateCount);
        var gathered = Operations(problem) + (problem.WantsDistributions ? 0 : problem.Times.Count * (problem.Rates.Count + problem.Totals.Count) * 10.0);
        var wide = StepCount(mean) * entries * WideOperations;
        return (wide <= AffordableOperations ? wide : StepCount(mean) * entries * PlainOperations) + gathered;
    }

    /// <inheritdoc/>
    public TransientResult Solve(TransientProblem problem, SolveContext context)
    {
        ArgumentNullException.ThrowIfNull(context);
        var size = ProblemSize.Of(problem);
        ReachedChain.CheckRange(size.LargestExit);
        ProblemCheck.Range(problem, problem.Times.DefaultIfEmpty(0).Max());
        var reached = ReachedChain.Reach(problem.Generator, problem.Start, problem.Alive);
        if (size.LargestExit == 0 || problem.Times.All(t => t == 0))
        {
            // Nothing moves: there is nothing to uniformize.
            return new SquaringRun(problem, keepsAll: false).At(problem.Times, context);
        }

        var mean = LongestMean(size, problem.Times);
        if (!(mean <= PoissonWindow.LargestMean))
        {
            throw new NotConvergedException(
                $"Uniformization would take {mean:G3} steps; it is meant for up to {PoissonWindow.LargestMean:G1}. Choose another method.");
        }

        var entries = size.Transitions + (3.0 * problem.Generator.StateCount);
        var isWide = StepCount(mean) * entries * WideOperations <= AffordableOperations;
        if (!isWide)
        {
            // One double loses a rounding or so an entry and a step.
            var most = (problem.Generator.TransitionCount / Math.Max(1.0, size.States)) + 5;
            isWide = StepCount(mean) * most * Rounding * 4 > context.Tolerance;
        }

        return new UniformizationPass(problem, reached, isWide, context).Run();
    }

    private static double LongestMean(ProblemSize size, IReadOnlyList<double> times) =>
        UniformizedStep.Margin * size.LargestExit * times.DefaultIfEmpty(0).Max();

    private static double StepCount(double mean) => mean + (9 * Math.Sqrt(mean)) + 30;

    private static double Operations(TransientProblem problem) =>
        problem.WantsDistributions ? 10.0 * problem.Generator.StateCount * problem.Times.Count * 30 : 0;
}
