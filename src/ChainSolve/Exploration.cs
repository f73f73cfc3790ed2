using ChainSolve.Language.Diagnostics;

namespace ChainSolve;

/// <summary>The states of a model in figures. Immutable; safe to share between threads.</summary>
public sealed record Exploration
{
    /// <summary>The model, with the givens that it was explored for.</summary>
    public required Model Model { get; init; }

    /// <summary>The number of states that can be reached.</summary>
    public required int StateCount { get; init; }

    /// <summary>The number of transitions between different states.</summary>
    public required long TransitionCount { get; init; }

    /// <summary>The number of groups of states that are never left once entered; 1 for a plant that always comes back.</summary>
    public required int RecurrentClassCount { get; init; }

    /// <summary>The number of states that are left for good, sooner or later.</summary>
    public required int TransientStateCount { get; init; }

    /// <summary>The number of single states that are never left.</summary>
    public required int AbsorbingStateCount { get; init; }

    /// <summary>The largest rate out of any state, per unit of time of the model.</summary>
    public required double LargestExitRate { get; init; }

    /// <summary>Warnings about the text and the states.</summary>
    public required IReadOnlyList<Diagnostic> Warnings { get; init; }

    /// <summary>How long the call took.</summary>
    public required TimeSpan Elapsed { get; init; }
}
