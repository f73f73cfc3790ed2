using ChainSolve.Numerics.Elimination;
using ChainSolve.Numerics.Iteration;
using ChainSolve.Numerics.Operators;

namespace ChainSolve.Numerics.Absorption;

/// <summary>The elimination of <see cref="GthAbsorptionSolver"/> on a sparse matrix in an order of small fill. The bound is proved.</summary>
internal sealed class SparseGthAbsorptionSolver : IAbsorptionSolver
{
    public string Name => "sparse-gth";

    public double Cost(AbsorptionProblem problem)
    {
        var order = problem.Generator.Pattern.Order;
        if (order.Order is null)
        {
            // Too much for the whole chain; the part that counts may still be small enough.
            order = AliveChain.Of(problem).Restriction.Generator.Pattern.Order;
        }

        return (30 * order.Updates) + (100.0 * order.Fill) + (100.0 * problem.Generator.StateCount);
    }

    public AbsorptionResult Solve(AbsorptionProblem problem, SolveContext context) =>
        EliminationAnswers.Of(
            problem,
            chain => SparseElimination.Of(chain.Restriction.Generator, chain.ToEnd, Order(problem, chain.Restriction), context),
            $"sparse gth elimination of order {problem.Alive.Count(a => a)}");

    /// <summary>The order of the whole pattern, without the states that do not count: they can only take fill away.</summary>
    private static int[]? Order(AbsorptionProblem problem, Restriction part)
    {
        if (problem.Generator.Pattern.Order.Order is not { } whole)
        {
            return part.Generator.Pattern.Order.Order;
        }

        var number = new int[whole.Length];
        Array.Fill(number, -1);
        for (var k = 0; k < part.States.Length; k++)
        {
            number[part.States[k]] = k;
        }

        return [.. whole.Select(s => number[s]).Where(k => k >= 0)];
    }
}
