using ChainSolve.Numerics.Operators;

namespace ChainSolve.Numerics.Timeline;

/// <summary>A stretch of time with a constant generator.</summary>
/// <param name="Generator">The chain while it lasts.</param>
/// <param name="Duration">How long it lasts; infinite for the last one.</param>
public sealed record Segment(Generator Generator, double Duration);
