namespace ChainSolve.Numerics.Iteration;

/// <summary>What a long call is given besides its problem. Immutable; safe to share between threads.</summary>
public sealed record SolveContext
{
    /// <summary>No cancellation, no progress, default accuracy, one thread.</summary>
    public static SolveContext Default { get; } = new();

    /// <summary>Stops the call with <see cref="OperationCanceledException"/>.</summary>
    public CancellationToken Cancellation { get; init; }

    /// <summary>Told from time to time; null for silence.</summary>
    public IProgress<SolveProgress>? Progress { get; init; }

    /// <summary>The relative accuracy wanted of every value. Solvers aim at about 1e-13 where that costs little.</summary>
    public double Tolerance { get; init; } = 1e-9;

    /// <summary>Values below this need no relative accuracy.</summary>
    public double Negligible { get; init; } = 1e-290;

    /// <summary>How many threads the call may use; at least 1. Results do not depend on it.</summary>
    public int Threads { get; init; } = 1;
}
