using ChainSolve.Numerics.Iteration;
using ChainSolve.Numerics.Krylov;

namespace ChainSolve.Numerics.Transient;

/// <summary>The methods for transient problems, by name, and the choice between them.</summary>
/// <remarks>Safe to share between threads.</remarks>
public static class TransientSolvers
{
    // Within some milliseconds the method that is right to one rounding is taken whatever another would take, and within
    // about a second before one that would lose more than a few.
    private const double CheapSquaring = 2e7;
    private const double AffordableSquaring = 8e9;

    // Some minutes for a proof; beyond, an estimate is better than none.
    private const double PatientWork = 2e12;

    /// <summary>The methods of this library.</summary>
    public static IReadOnlyList<ITransientSolver> All { get; } = [new SquaringSolver(), new UniformizationSolver(), new KrylovSolver()];

    /// <summary>Chooses a method.</summary>
    /// <param name="problem">What is asked.</param>
    /// <param name="name">The name of the method; null to choose by what each would cost.</param>
    /// <param name="solvers">The methods to choose from; null for <see cref="All"/>.</param>
    /// <exception cref="ArgumentException">There is no method of that name, or the problem does not fit together.</exception>
    /// <exception cref="NotConvergedException">No method can do the problem.</exception>
    public static Choice<ITransientSolver> Select(
        TransientProblem problem, string? name = null, IReadOnlyList<ITransientSolver>? solvers = null) =>
        Rank(problem, name, solvers)[0];

    /// <summary>Chooses a method and solves the problem with it; where it fails, with the next best.</summary>
    /// <param name="problem">What is asked.</param>
    /// <param name="name">The name of the method; null to choose by what each would cost.</param>
    /// <param name="solvers">The methods to choose from; null for <see cref="All"/>.</param>
    /// <param name="context">Cancellation, progress and accuracy; null for the default.</param>
    /// <returns>The values, the method that gave them, and why it was taken.</returns>
    /// <exception cref="ArgumentException">There is no method of that name, or the problem does not fit together.</exception>
    /// <exception cref="NotConvergedException">No method gave a value.</exception>
    /// <exception cref="OperationCanceledException">The context's token was cancelled.</exception>
    public static (TransientResult Result, Choice<ITransientSolver> Choice) Solve(
        TransientProblem problem, string? name = null, IReadOnlyList<ITransientSolver>? solvers = null, SolveContext? context = null) =>
        Attempts.First(Rank(problem, name, solvers), s => s.Solve(problem, context ?? SolveContext.Default), s => s.Name);

    /// <summary>The methods that can do the problem, the best first; only one where a name is given.</summary>
    internal static IReadOnlyList<Choice<ITransientSolver>> Rank(
        TransientProblem problem, string? name, IReadOnlyList<ITransientSolver>? solvers)
    {
        ProblemCheck.Check(problem);
        solvers ??= All;
        if (name is not null)
        {
            return [new(SolverNames.Find(solvers, s => s.Name, name, "transient"), "asked for by name")];
        }

        var costs = new List<Costed>();
        foreach (var solver in solvers)
        {
            costs.Add(new Costed(solver, solver.Cost(problem)));
        }

        costs.RemoveAll(c => !double.IsFinite(c.Cost));
        if (costs.Count == 0)
        {
            throw new NotConvergedException(
                $"None of the methods {string.Join(", ", solvers.Select(s => s.Name))} can do {problem.Generator.StateCount} states to these times.");
        }

        var ranked = new List<Choice<ITransientSolver>>();
        foreach (var solver in InOrder([.. costs.OrderBy(c => c.Cost)], problem))
        {
            ranked.Add(new(solver, Reason(solver)));
        }

        return ranked;
    }

    /// <summary>
    /// By cost, but for the methods of this library. Squaring is right to one rounding, and goes first where it is cheap. Where it is not, uniformization
    /// is tried before it as long as it promises to take less work, since many chains settle long before the last time. Subspaces give no proof, and come last.
    /// </summary>
    private static IEnumerable<ITransientSolver> InOrder(IReadOnlyList<Costed> costs, TransientProblem problem)
    {
        var squaring = costs.FirstOrDefault(c => c.Solver is SquaringSolver);
        var walk = costs.FirstOrDefault(c => c.Solver is UniformizationSolver);
        var subspaces = costs.FirstOrDefault(c => c.Solver is KrylovSolver);
        var squaringCost = squaring?.Cost ?? double.PositiveInfinity;
        var most = Math.Min(squaringCost, subspaces is null ? double.PositiveInfinity : PatientWork);
        var isRough = walk is not null && (walk.Cost > squaringCost || !UniformizationSolver.IsWide(problem));
        if (walk?.Cost > most)
        {
            walk = walk with { Solver = new UniformizationSolver { MostWork = most } };
        }

        Costed?[] order = squaringCost <= (isRough ? AffordableSquaring : CheapSquaring)
            ? [squaring, walk, subspaces]
            : squaringCost <= PatientWork ? [walk, squaring, subspaces]
            : [walk, subspaces, squaring];
        var own = new Queue<Costed>(order.OfType<Costed>());
        return costs.Select(c => c.Solver is SquaringSolver or UniformizationSolver or KrylovSolver ? own.Dequeue().Solver : c.Solver);
    }

    private static string Reason(ITransientSolver solver) => solver switch
    {
        SquaringSolver => "the chain is small: squaring its matrix is right to one rounding at any time",
        KrylovSolver => "the chain is large and stiff, and subspaces take the least work",
        UniformizationSolver => "uniformization takes the least work for this size and these times",
        _ => "it takes the least work by its own account",
    };

    private sealed record Costed(ITransientSolver Solver, double Cost);
}
