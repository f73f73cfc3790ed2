using ChainSolve.Numerics.Absorption;
using ChainSolve.Numerics.Iteration;
using ChainSolve.Numerics.Stationary;
using ChainSolve.Numerics.Transient;

namespace ChainSolve;

/// <summary>How a model is solved. Immutable; safe to share between threads.</summary>
public sealed record SolveOptions
{
    /// <summary>The options that hold where none are given.</summary>
    public static SolveOptions Default { get; } = new();

    /// <summary>The relative accuracy wanted of every value, above 0 and below 1. More is computed where it costs little.</summary>
    public double Tolerance { get; init; } = 1e-9;

    /// <summary>Values whose size is surely below this need no relative accuracy.</summary>
    public double Negligible { get; init; } = 1e-290;

    /// <summary>The name of the method for values at a time; null to choose.</summary>
    public string? TransientMethod { get; init; }

    /// <summary>The name of the method for stationary vectors; null to choose.</summary>
    public string? StationaryMethod { get; init; }

    /// <summary>The name of the method for times to an event; null to choose.</summary>
    public string? AbsorptionMethod { get; init; }

    /// <summary>The methods for values at a time to choose from, own ones among them; null for all of this library.</summary>
    public IReadOnlyList<ITransientSolver>? TransientSolvers { get; init; }

    /// <summary>The methods for stationary vectors to choose from, own ones among them; null for all of this library.</summary>
    public IReadOnlyList<IStationarySolver>? StationarySolvers { get; init; }

    /// <summary>The methods for times to an event to choose from, own ones among them; null for all of this library.</summary>
    public IReadOnlyList<IAbsorptionSolver>? AbsorptionSolvers { get; init; }

    /// <summary>The most states that are explored, at least 1; beyond it <see cref="LimitExceededException"/>.</summary>
    public long MaxStates { get; init; } = 20_000_000;

    /// <summary>
    /// About how many bytes the chain may take, above 0; beyond it <see cref="LimitExceededException"/>, as soon as it can be told: while states are explored, and before transitions
    /// are stored. Null for no limit. What solvers take besides is of the same order.
    /// </summary>
    public long? MaxMemory { get; init; }

    /// <summary>How long the call may take; beyond it <see cref="LimitExceededException"/>. Null for no limit.</summary>
    public TimeSpan? TimeLimit { get; init; }

    /// <summary>How many threads may work, at least 1. Results do not depend on it.</summary>
    public int Threads { get; init; } = 1;

    /// <summary>Told from time to time how far the call is; null for silence.</summary>
    public IProgress<SolveProgress>? Progress { get; init; }

    /// <summary>What solvers are told besides their problem.</summary>
    internal SolveContext Context(CancellationToken cancellation) => new()
    {
        Cancellation = cancellation,
        Progress = Progress,
        Tolerance = Tolerance,
        Negligible = Negligible,
        Threads = Threads,
    };

    /// <summary>The methods for long-run and first-passage values.</summary>
    internal SolverOptions Solvers() => new()
    {
        Stationary = StationaryMethod,
        Absorption = AbsorptionMethod,
        StationarySolvers = StationarySolvers,
        AbsorptionSolvers = AbsorptionSolvers,
    };

    /// <summary>Throws where an option has no meaning.</summary>
    internal void Check()
    {
        if (!(Tolerance > 0) || Tolerance >= 1)
        {
            throw new ArgumentOutOfRangeException(nameof(Tolerance), Tolerance, "The tolerance is relative: above 0 and below 1.");
        }

        if (!(Negligible >= 0) || !double.IsFinite(Negligible))
        {
            throw new ArgumentOutOfRangeException(nameof(Negligible), Negligible, "A size below which values are negligible is finite and not negative.");
        }

        ArgumentOutOfRangeException.ThrowIfLessThan(MaxStates, 1, nameof(MaxStates));
        ArgumentOutOfRangeException.ThrowIfLessThan(MaxMemory ?? 1, 1, nameof(MaxMemory));
        ArgumentOutOfRangeException.ThrowIfLessThan(Threads, 1, nameof(Threads));
        if (TimeLimit is { } limit && (limit <= TimeSpan.Zero || limit.TotalMilliseconds > int.MaxValue))
        {
            throw new ArgumentOutOfRangeException(nameof(TimeLimit), limit, "A time limit is above 0 and at most 24 days.");
        }

        Known(TransientMethod, (TransientSolvers ?? Numerics.Transient.TransientSolvers.All).Select(s => s.Name), "transient", nameof(TransientMethod));
        Known(StationaryMethod, (StationarySolvers ?? Numerics.Stationary.StationarySolvers.All).Select(s => s.Name), "stationary", nameof(StationaryMethod));
        Known(AbsorptionMethod, (AbsorptionSolvers ?? Numerics.Absorption.AbsorptionSolvers.All).Select(s => s.Name), "absorption", nameof(AbsorptionMethod));
    }

    private static void Known(string? method, IEnumerable<string> names, string job, string parameter)
    {
        if (method is not null && !names.Contains(method, StringComparer.Ordinal))
        {
            throw new ArgumentException($"There is no {job} method '{method}'; the methods are {string.Join(", ", names)}.", parameter);
        }
    }
}
