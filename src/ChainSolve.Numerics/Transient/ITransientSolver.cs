using ChainSolve.Numerics.Iteration;

namespace ChainSolve.Numerics.Transient;

/// <summary>A method for transient problems. Implementations are immutable and safe to share between threads.</summary>
public interface ITransientSolver
{
    /// <summary>The name by which it can be asked for, lower case with hyphens.</summary>
    string Name { get; }

    /// <summary>
    /// About how many floating-point operations the problem would take; infinite where the method cannot do it.
    /// </summary>
    double Cost(TransientProblem problem);

    /// <summary>Solves the problem.</summary>
    /// <exception cref="OperationCanceledException">The context's token was cancelled.</exception>
    /// <exception cref="NotConvergedException">No value could be given.</exception>
    TransientResult Solve(TransientProblem problem, SolveContext context);
}
