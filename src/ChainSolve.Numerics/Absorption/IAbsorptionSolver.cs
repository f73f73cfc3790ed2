using ChainSolve.Numerics.Iteration;

namespace ChainSolve.Numerics.Absorption;

/// <summary>
/// A method for chains that are left for good: with S the generator between the states that count, the sojourn times
/// p0 (-S)⁻¹ and the expected earnings (-S)⁻¹ r. Implementations are immutable and safe to share between threads.
/// </summary>
public interface IAbsorptionSolver
{
    /// <summary>The name by which it can be asked for, lower case with hyphens.</summary>
    string Name { get; }

    /// <summary>About how many floating-point operations the problem would take; infinite where the method cannot do it.</summary>
    double Cost(AbsorptionProblem problem);

    /// <summary>Solves the problem.</summary>
    /// <exception cref="OperationCanceledException">The context's token was cancelled.</exception>
    /// <exception cref="NotConvergedException">No value could be given.</exception>
    AbsorptionResult Solve(AbsorptionProblem problem, SolveContext context);
}
