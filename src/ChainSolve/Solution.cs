using ChainSolve.Language.Diagnostics;
using ChainSolve.Numerics.Estimates;

namespace ChainSolve;

/// <summary>The values of a model's measures. Immutable; safe to share between threads.</summary>
public sealed record Solution
{
    /// <summary>The model, with the givens that were solved for.</summary>
    public required Model Model { get; init; }

    /// <summary>The measures, in the order of the model and by name.</summary>
    public required MeasureResults Measures { get; init; }

    /// <summary>The number of states.</summary>
    public required int StateCount { get; init; }

    /// <summary>The number of transitions between different states.</summary>
    public required long TransitionCount { get; init; }

    /// <summary>Warnings about the text, the states and the calculation.</summary>
    public required IReadOnlyList<Diagnostic> Warnings { get; init; }

    /// <summary>How long the call took.</summary>
    public required TimeSpan Elapsed { get; init; }

    /// <summary>The worst status of any measure.</summary>
    public SolveStatus Status => Measures.Select(m => m.Status).DefaultIfEmpty(SolveStatus.Ok).Max();
}
