using System.Runtime.Intrinsics;
using ChainSolve.Numerics.Operators;

namespace ChainSolve.Numerics.Kernels;

/// <summary>Chooses the kernel of a step.</summary>
internal static class StepKernels
{
    // Laying out costs about as much as this many steps on rows.
    private const long FewestSteps = 50;

    // Below this, eight at once gain nothing over the calls.
    private const int FewestStates = 64;

    /// <summary>The kernel that takes the least time for a number of steps, laying out included.</summary>
    public static IStepKernel For(SparseRows columns, bool[] among, long steps, CancellationToken cancellation) =>
        Vector256.IsHardwareAccelerated && steps >= FewestSteps && columns.Count >= FewestStates
            && ChunkedDiagonals.TryBuild(columns, among, cancellation) is { } diagonals
            ? new ChunkKernel(diagonals)
            : new RowKernel(columns);
}
