using ChainSolve.Language.Diagnostics;
using ChainSolve.Language.Text;

namespace ChainSolve.Modelling;

/// <summary>
/// A model with all names, units and types resolved, and the values of its givens still open. What depends on givens is
/// an expression; what depends on the state too is an expression over the marking.
/// </summary>
/// <remarks>
/// A marking is one whole number a variable: first the places of all items in order (how many replicas are in each),
/// then the counters. Immutable; safe to share between threads.
/// </remarks>
internal sealed record BoundModel
{
    public required SourceText Source { get; init; }

    /// <summary>The title behind <c>model</c>; null where none is written.</summary>
    public required string? Title { get; init; }

    /// <summary>The unit of time of all numbers inside the model and of results.</summary>
    public required TimeBase TimeBase { get; init; }

    public required IReadOnlyList<BoundGiven> Givens { get; init; }

    public required IReadOnlyList<BoundItem> Items { get; init; }

    public required IReadOnlyList<BoundCounter> Counters { get; init; }

    public IReadOnlyList<BoundCrew> Crews { get; init; } = [];

    /// <summary>Every place and counter by its index in a marking.</summary>
    public required IReadOnlyList<BoundVariable> Variables { get; init; }

    /// <summary>What can happen: the moves of items and the events, in the order of the text.</summary>
    public required IReadOnlyList<BoundTransition> Transitions { get; init; }

    public required IReadOnlyList<BoundReward> Rewards { get; init; }

    public required IReadOnlyList<BoundMeasure> Measures { get; init; }

    /// <summary>Warnings found while binding.</summary>
    public required IReadOnlyList<Diagnostic> Warnings { get; init; }
}
