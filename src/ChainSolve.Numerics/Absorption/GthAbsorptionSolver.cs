using ChainSolve.Numerics.Elimination;
using ChainSolve.Numerics.Iteration;

namespace ChainSolve.Numerics.Absorption;

/// <summary>
/// Elimination without subtractions on a full matrix, with the rate to the end in the pivot, in extended precision
/// (Alfa, Xue and Ye, Math. Comp. 71 (2002); from memory). The bound is proved.
/// </summary>
internal sealed class GthAbsorptionSolver : IAbsorptionSolver
{
    /// <summary>The most states for which it is used.</summary>
    public const int MaxStates = 1000;

    public string Name => "gth";

    public double Cost(AbsorptionProblem problem)
    {
        double n = problem.Alive.Count(a => a);
        return n > MaxStates ? double.PositiveInfinity : 10 * n * n * n;
    }

    public AbsorptionResult Solve(AbsorptionProblem problem, SolveContext context)
    {
        var count = problem.Alive.Count(a => a);
        if (count > MaxStates)
        {
            throw new NotConvergedException($"The method gth takes at most {MaxStates} states; {count} count.");
        }

        return EliminationAnswers.Of(
            problem,
            chain => DenseElimination.Of(chain.Restriction.Generator, chain.ToEnd, context.Cancellation),
            $"gth elimination of order {count}");
    }
}
