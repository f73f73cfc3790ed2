using ChainSolve.Numerics.Operators;

namespace ChainSolve.Numerics.Timeline;

/// <summary>A stretch of time with a constant generator.</summary>
/// <param name="Generator">The chain while it lasts.</param>
/// <param name="Duration">How long it lasts, in the unit of the rates; infinite for the last one.</param>
/// <remarks>Immutable; safe to share between threads. A <see cref="Course"/> checks the duration.</remarks>
public sealed record Segment(Generator Generator, double Duration);
