using ChainSolve.Numerics.Iteration;
using ChainSolve.Numerics.Operators;

namespace ChainSolve.Numerics.Stationary;

/// <summary>
/// A method for the stationary vector of an irreducible chain. Implementations are immutable and safe to share between threads.
/// </summary>
public interface IStationarySolver
{
    /// <summary>The name by which it can be asked for, lower case with hyphens.</summary>
    string Name { get; }

    /// <summary>About how many floating-point operations the chain would take; infinite where the method cannot do it.</summary>
    double Cost(Generator generator);

    /// <summary>Finds π with πQ = 0 and π1 = 1.</summary>
    /// <param name="generator">An irreducible chain; one state is legal.</param>
    /// <param name="context">Cancellation, progress and accuracy.</param>
    /// <exception cref="OperationCanceledException">The context's token was cancelled.</exception>
    /// <exception cref="NotConvergedException">No value could be given.</exception>
    StationaryVector Solve(Generator generator, SolveContext context);
}
