using ChainSolve.Numerics.Balance;
using ChainSolve.Numerics.Iteration;
using ChainSolve.Numerics.Multilevel;
using ChainSolve.Numerics.Operators;

namespace ChainSolve.Numerics.Stationary;

/// <summary>The methods for stationary vectors, by name, and the choice between them.</summary>
/// <remarks>Safe to share between threads.</remarks>
public static class StationarySolvers
{
    // Within this many operations, about a second, an elimination, whose bound is proved, is preferred to anything faster.
    private const double AffordableElimination = 3e9;

    /// <summary>The methods of this library.</summary>
    public static IReadOnlyList<IStationarySolver> All { get; } =
    [
        new GthSolver(),
        new SparseGthSolver(),
        new DetailedBalanceSolver(),
        new SweepSolver("gauss-seidel", false),
        new SweepSolver("sor", true),
        new MultilevelSolver(),
        BalanceSolver.BiConjugate,
        BalanceSolver.MinimalResidual,
    ];

    /// <summary>Chooses a method for an irreducible chain.</summary>
    /// <param name="generator">The chain.</param>
    /// <param name="name">The name of the method; null to choose by structure and size.</param>
    /// <param name="solvers">The methods to choose from; null for <see cref="All"/>.</param>
    /// <exception cref="ArgumentException">There is no method of that name.</exception>
    public static Choice<IStationarySolver> Select(
        Generator generator, string? name = null, IReadOnlyList<IStationarySolver>? solvers = null) =>
        Rank(generator, name, solvers)[0];

    /// <summary>The methods that can do the chain, the best first; only one where a name is given.</summary>
    internal static IReadOnlyList<Choice<IStationarySolver>> Rank(
        Generator generator, string? name, IReadOnlyList<IStationarySolver>? solvers)
    {
        ArgumentNullException.ThrowIfNull(generator);
        solvers ??= All;
        if (name is not null)
        {
            return [new(SolverNames.Find(solvers, s => s.Name, name, "stationary"), "asked for by name")];
        }

        var small = solvers.OfType<GthSolver>().FirstOrDefault();
        if (small is not null && generator.StateCount <= 60)
        {
            return [new(small, "the chain is small: elimination without subtractions has a proved bound")];
        }

        var balanced = solvers.OfType<DetailedBalanceSolver>().FirstOrDefault();
        if (balanced is not null && double.IsFinite(balanced.Cost(generator)))
        {
            return [new(balanced, "the chain is reversible: balance pair by pair has a proved bound")];
        }

        var hasMultilevel = solvers.OfType<MultilevelSolver>().Any();
        var ranked = new List<(double Cost, Choice<IStationarySolver> Choice)>();
        foreach (var solver in solvers)
        {
            var cost = solver.Cost(generator);
            if (!double.IsFinite(cost))
            {
                continue;
            }

            var (delay, why) = solver switch
            {
                GthSolver or SparseGthSolver when cost > AffordableElimination => (1e12, "nothing quicker gave an answer"),
                GthSolver => (0.0, "the chain is small: elimination without subtractions has a proved bound"),
                SparseGthSolver => (0.0, "its elimination stays sparse enough, and the bound is proved"),
                _ => (AffordableElimination, "the chain is too large for an elimination"),
            };
            var taken = hasMultilevel && solver is SweepSolver sweeps ? sweeps.LeftEarly() : solver;
            ranked.Add((cost + delay, new(taken, why)));
        }

        return ranked.Count == 0
            ? throw new NotConvergedException($"None of the methods {string.Join(", ", solvers.Select(s => s.Name))} can do a chain of {generator.StateCount} states.")
            : [.. ranked.OrderBy(r => r.Cost).Select(r => r.Choice)];
    }
}
