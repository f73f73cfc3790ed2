namespace ChainSolve.Numerics.Iteration;

/// <summary>How far a long call has come.</summary>
/// <param name="Stage">What is being done, in a few words: <c>exploring</c>, <c>uniformization</c>.</param>
/// <param name="Done">Steps done so far.</param>
/// <param name="Total">Steps expected; 0 where it is not known.</param>
/// <param name="Detail">Further figures for a reader; may be empty.</param>
public readonly record struct SolveProgress(string Stage, long Done, long Total, string Detail);
