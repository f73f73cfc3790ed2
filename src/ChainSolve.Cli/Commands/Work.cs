using ChainSolve.Numerics.Iteration;

namespace ChainSolve.Cli.Commands;

/// <summary>What a long call is given: whom to tell how far it is, and when to stop.</summary>
internal sealed record Work(IProgress<SolveProgress>? Progress, CancellationToken Cancellation);
