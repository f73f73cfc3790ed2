using ChainSolve.Numerics.Iteration;

namespace ChainSolve.Numerics.Transient;

/// <summary>
/// Scaling and squaring of the whole transition matrix, non-negative throughout and in two doubles: for small chains, at
/// any times.
/// </summary>
/// <remarks>
/// Every value comes with a proved bound of about one rounding of a double, be it 0.9 or 1e-200, at any ratio of rates. Work
/// grows with the third power of the number of states and with the logarithm of rate times time. Safe to share between threads.
/// </remarks>
public sealed class SquaringSolver : ITransientSolver
{
    // Operations on doubles for one multiplication and addition of numbers of two doubles, with its bound.
    internal const double OperationsPerProduct = 25;

    /// <inheritdoc/>
    public string Name => "squaring";

    /// <inheritdoc/>
    public double Cost(TransientProblem problem)
    {
        ArgumentNullException.ThrowIfNull(problem);
        var size = ProblemSize.Estimate(problem);
        if (size.States >= SquaringRun.MaxStates)
        {
            return double.PositiveInfinity;
        }

        var (states, longest) = (size.States + 1.0, problem.Times.DefaultIfEmpty(0).Max());
        var levels = Math.Max(0, Math.Log2(size.LargestExit) + Math.Log2(longest) + 5);
        var columns = 1.0 + problem.Totals.Count;
        var series = 20 * (size.Transitions + states) * ((levels > 0 ? states : 0) + columns);
        var squarings = levels * states * states * (states + columns);
        var times = problem.Times.Count * Math.Min(27, levels / 2) * states * states;
        return OperationsPerProduct * (series + squarings + times);
    }

    /// <inheritdoc/>
    public TransientResult Solve(TransientProblem problem, SolveContext context)
    {
        ArgumentNullException.ThrowIfNull(context);
        return new SquaringRun(problem, keepsAll: false).At(problem.Times, context);
    }
}
