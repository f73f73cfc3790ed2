using ChainSolve.Expressions;
using ChainSolve.Language.Text;

namespace ChainSolve.Modelling;

/// <summary>An item: replicas that move between places.</summary>
internal sealed record BoundItem
{
    public required string Name { get; init; }

    /// <summary>How many replicas; reads givens only. The constant 1 for an item declared without <c>x</c>.</summary>
    public required NumberExpr Count { get; init; }

    /// <summary>Whether it was declared with <c>x</c>.</summary>
    public required bool IsReplicated { get; init; }

    /// <summary>Its states in order.</summary>
    public required IReadOnlyList<string> States { get; init; }

    /// <summary>The variable of its first place; the places of an item stand side by side, one a state.</summary>
    public required int FirstVariable { get; init; }

    /// <summary>One a state: a count, or a probability for a single item with several start states; reads givens only.</summary>
    public required IReadOnlyList<NumberExpr> Start { get; init; }

    /// <summary>Whether <see cref="Start"/> holds probabilities.</summary>
    public required bool StartIsDrawn { get; init; }

    public required TextSpan Span { get; init; }
}

/// <summary>A bounded whole number.</summary>
internal sealed record BoundCounter
{
    public required string Name { get; init; }

    /// <summary>The range, ends included; reads givens only.</summary>
    public required NumberExpr Low { get; init; }

    public required NumberExpr High { get; init; }

    public required NumberExpr Start { get; init; }

    public required int Variable { get; init; }

    public required TextSpan Span { get; init; }
}

/// <summary>A crew. Its effect on rates is part of the transitions already.</summary>
/// <param name="Name">The name.</param>
/// <param name="Count">How many jobs it serves at once, a whole number that is not negative; reads givens only.</param>
/// <param name="Span">Where its count is written.</param>
internal sealed record BoundCrew(string Name, NumberExpr Count, TextSpan Span);

/// <summary>A component of a marking.</summary>
/// <param name="Item">Index of the item, or -1 for a counter.</param>
/// <param name="State">Index of the item's state, or of the counter among the counters.</param>
/// <param name="Name">How messages call it: <c>pump.up</c> or <c>stock</c>.</param>
internal sealed record BoundVariable(int Item, int State, string Name);
