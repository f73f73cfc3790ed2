using ChainSolve.Numerics.Elimination;
using ChainSolve.Numerics.Iteration;
using ChainSolve.Numerics.Operators;

namespace ChainSolve.Numerics.Stationary;

/// <summary>
/// Elimination without subtractions on a full matrix, carried in extended precision (Grassmann, Taksar and Heyman 1985;
/// error analysis after O'Cinneide, Numer. Math. 65 (1993); both from memory). The bound is proved.
/// </summary>
internal sealed class GthSolver : IStationarySolver
{
    /// <summary>The most states for which it is used.</summary>
    public const int MaxStates = 1000;

    public string Name => "gth";

    public double Cost(Generator generator)
    {
        double n = generator.StateCount;
        return n > MaxStates ? double.PositiveInfinity : 10 * n * n * n;
    }

    public StationaryVector Solve(Generator generator, SolveContext context)
    {
        if (generator.StateCount > MaxStates)
        {
            throw new NotConvergedException($"The method gth takes at most {MaxStates} states; the chain has {generator.StateCount}.");
        }

        var elimination = DenseElimination.Of(generator, null, context.Cancellation);
        return Normalised.Vector(elimination.Stationary(), elimination.RelativeBound, $"gth elimination of order {generator.StateCount}");
    }
}
