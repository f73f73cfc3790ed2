using ChainSolve.Numerics.Iteration;
using ChainSolve.Numerics.Kernels;
using ChainSolve.Numerics.Transient;

namespace ChainSolve.Numerics.Krylov;

/// <summary>
/// The exponential on small subspaces, one after the other (Y. Saad, SIAM J. Numer. Anal. 29 (1992); E. Gallopoulos and Y. Saad 1992; from memory): in each, the distribution
/// is followed as far as the defect of the subspace allows.
/// </summary>
/// <remarks>
/// For large chains with rates far apart that take very long to settle: once fast movements have died out, a subspace reaches far. What a subspace leaves out is bounded by
/// the integral of its defect (as in T. Jawecki, W. Auzinger, O. Koch, BIT 60 (2020)); here in the norm of sums, in which the exponential of a generator never enlarges
/// an error. That integral is summed from samples, and rounding is counted by experience: bounds are estimated, and absolute, so that small
/// probabilities are not as accurate as large ones. Safe to share between threads.
/// </remarks>
public sealed class KrylovSolver : ITransientSolver
{
    // Restarts that a long problem may take, as experience has it.
    private const double UsualRestarts = 200;

    /// <inheritdoc/>
    public string Name => "krylov";

    /// <inheritdoc/>
    public double Cost(TransientProblem problem)
    {
        ArgumentNullException.ThrowIfNull(problem);
        var size = ProblemSize.Estimate(problem);
        var states = problem.Generator.StateCount;
        var basis = KrylovRun.MostVectors * ((KrylovRun.MostVectors * 2.0 * states) + (RowKernel.UsualCost.Plain * (size.Transitions + states)));
        var longest = problem.Times.DefaultIfEmpty(0).Max();
        return double.IsFinite(size.LargestExit * longest)
            ? Math.Min(UsualRestarts, 1 + (size.LargestExit * longest)) * (basis + 5e6)
            : double.PositiveInfinity;
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

        return new KrylovRun(problem, reached, context).Run();
    }
}
