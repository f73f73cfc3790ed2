namespace ChainSolve.Numerics.Kernels;

/// <summary>What a step tells of the elements that it wrote.</summary>
/// <param name="Mass">Their sum, rounded; summed in eight lanes whatever the kernel.</param>
/// <param name="Dropped">How many were below <see cref="StepScale.Flushed"/>.</param>
internal readonly record struct StepTally(double Mass, int Dropped);
