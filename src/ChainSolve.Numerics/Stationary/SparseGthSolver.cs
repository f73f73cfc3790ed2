using ChainSolve.Numerics.Elimination;
using ChainSolve.Numerics.Iteration;
using ChainSolve.Numerics.Operators;

namespace ChainSolve.Numerics.Stationary;

/// <summary>The elimination of <see cref="GthSolver"/> on a sparse matrix in an order of small fill. The bound is proved.</summary>
internal sealed class SparseGthSolver : IStationarySolver
{
    public string Name => "sparse-gth";

    public double Cost(Generator generator)
    {
        var order = generator.Pattern.Order;
        return (30 * order.Updates) + (100.0 * order.Fill) + (100.0 * generator.StateCount);
    }

    public StationaryVector Solve(Generator generator, SolveContext context)
    {
        var elimination = SparseElimination.Of(generator, null, generator.Pattern.Order.Order, context);
        return Normalised.Vector(
            elimination.Stationary(),
            elimination.RelativeBound,
            $"sparse gth elimination of order {generator.StateCount}, {generator.Pattern.Order.Fill} entries a side");
    }
}
