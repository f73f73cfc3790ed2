using ChainSolve.Numerics.Balance;
using ChainSolve.Numerics.Iteration;
using ChainSolve.Numerics.Multilevel;
using ChainSolve.Numerics.Stationary;

namespace ChainSolve.Numerics.Absorption;

/// <summary>The methods for chains that are left for good, by name, and the choice between them.</summary>
/// <remarks>Safe to share between threads.</remarks>
public static class AbsorptionSolvers
{
    private const double AffordableElimination = 6e10;

    /// <summary>The methods of this library.</summary>
    public static IReadOnlyList<IAbsorptionSolver> All { get; } =
    [
        new GthAbsorptionSolver(),
        new SparseGthAbsorptionSolver(),
        new RestartAbsorptionSolver(new SweepSolver("gauss-seidel", false), 1000),
        new RestartAbsorptionSolver(new MultilevelSolver(), 2000),
        new RestartAbsorptionSolver(BalanceSolver.BiConjugate, 5000),
        new RestartAbsorptionSolver(BalanceSolver.MinimalResidual, 5000),
    ];

    /// <summary>Chooses a method.</summary>
    /// <param name="problem">What is asked.</param>
    /// <param name="name">The name of the method; null to choose by structure and size.</param>
    /// <param name="solvers">The methods to choose from; null for <see cref="All"/>.</param>
    /// <exception cref="ArgumentException">There is no method of that name.</exception>
    public static Choice<IAbsorptionSolver> Select(
        AbsorptionProblem problem, string? name = null, IReadOnlyList<IAbsorptionSolver>? solvers = null) =>
        Rank(problem, name, solvers)[0];

    /// <summary>The methods that can do the problem, the best first; only one where a name is given.</summary>
    internal static IReadOnlyList<Choice<IAbsorptionSolver>> Rank(
        AbsorptionProblem problem, string? name, IReadOnlyList<IAbsorptionSolver>? solvers)
    {
        ArgumentNullException.ThrowIfNull(problem);
        solvers ??= All;
        if (name is not null)
        {
            return [new(SolverNames.Find(solvers, s => s.Name, name, "absorption"), "asked for by name")];
        }

        var small = solvers.OfType<GthAbsorptionSolver>().FirstOrDefault();
        if (small is not null && problem.Alive.Count(a => a) <= 60)
        {
            return [new(small, "few states count: elimination without subtractions has a proved bound")];
        }

        var hasMultilevel = solvers.OfType<RestartAbsorptionSolver>().Any(s => s.IsMultilevel);
        var ranked = new List<(double Cost, Choice<IAbsorptionSolver> Choice)>();
        foreach (var solver in solvers)
        {
            var cost = solver.Cost(problem);
            if (!double.IsFinite(cost))
            {
                continue;
            }

            var (delay, why) = solver switch
            {
                GthAbsorptionSolver or SparseGthAbsorptionSolver when cost > AffordableElimination => (1e12, "nothing quicker gave an answer"),
                GthAbsorptionSolver => (0.0, "few states count: elimination without subtractions has a proved bound"),
                SparseGthAbsorptionSolver => (0.0, "its elimination stays sparse enough, and the bound is proved"),
                _ => (AffordableElimination, "too many states count for an elimination"),
            };
            var taken = hasMultilevel && solver is RestartAbsorptionSolver restarted ? restarted.LeftEarly() : solver;
            ranked.Add((cost + delay, new(taken, why)));
        }

        return ranked.Count == 0
            ? throw new NotConvergedException(
                $"None of the methods {string.Join(", ", solvers.Select(s => s.Name))} can do {problem.Alive.Count(a => a)} states.")
            : [.. ranked.OrderBy(r => r.Cost).Select(r => r.Choice)];
    }
}
