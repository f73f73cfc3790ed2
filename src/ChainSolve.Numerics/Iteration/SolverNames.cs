namespace ChainSolve.Numerics.Iteration;

/// <summary>Finds solvers by name.</summary>
internal static class SolverNames
{
    public static TSolver Find<TSolver>(IReadOnlyList<TSolver> solvers, Func<TSolver, string> nameOf, string name, string kind) =>
        solvers.FirstOrDefault(s => nameOf(s) == name)
        ?? throw new ArgumentException(
            $"There is no {kind} method '{name}'. The methods are {string.Join(", ", solvers.Select(nameOf))}.", nameof(name));
}
