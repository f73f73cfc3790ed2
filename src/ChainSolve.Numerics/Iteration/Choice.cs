namespace ChainSolve.Numerics.Iteration;

/// <summary>A solver and why it was taken.</summary>
/// <typeparam name="TSolver">The kind of solver.</typeparam>
/// <param name="Solver">The solver.</param>
/// <param name="Why">One sentence for a reader.</param>
public sealed record Choice<TSolver>(TSolver Solver, string Why);
