using ChainSolve.Expressions;
using ChainSolve.Language.Text;

namespace ChainSolve.Modelling;

/// <summary>Something that can happen: the move of an item, all its replicas in the source together, or an event.</summary>
internal sealed record BoundTransition
{
    /// <summary>How messages call it: <c>move up -> down of pump</c>, <c>event order</c>.</summary>
    public required string Label { get; init; }

    /// <summary>
    /// The condition under which it can happen; null for always. Where it is false, rate and effects are not evaluated.
    /// </summary>
    public required ConditionExpr? Guard { get; init; }

    /// <summary>
    /// The rate at which it happens in a marking: for a move with the number of replicas and the share of the crew
    /// multiplied in. 0 disables it. Where it is 0, the effects are not evaluated.
    /// </summary>
    public required NumberExpr Rate { get; init; }

    /// <summary>What happens, all at once; every expression reads the marking before. Empty for a plain occurrence.</summary>
    public required IReadOnlyList<BoundEffect> Effects { get; init; }

    public required TextSpan Span { get; init; }
}

/// <summary>One line of what happens in an instant.</summary>
internal abstract record BoundEffect
{
    public required TextSpan Span { get; init; }
}

/// <summary>A counter takes a new value.</summary>
internal sealed record AssignEffect : BoundEffect
{
    /// <summary>The counter's variable.</summary>
    public required int Variable { get; init; }

    public required NumberExpr Value { get; init; }
}

/// <summary>Replicas of an item leave a place; each goes to a target drawn on its own.</summary>
internal sealed record MoveEffect : BoundEffect
{
    /// <summary>The variable of the place that is left.</summary>
    public required int From { get; init; }

    /// <summary>The targets: one with a null probability, or several whose probabilities add to 1 within 1e-9 and are normalised.</summary>
    public required IReadOnlyList<MoveTarget> Targets { get; init; }

    /// <summary>How many replicas move, a whole number that is not negative; null for all that the other lines leave in the place.</summary>
    public required NumberExpr? Count { get; init; }

    /// <summary>Whether the line is skipped where fewer replicas are in the place than it moves.</summary>
    public required bool IfAny { get; init; }
}

/// <summary>Where a replica may go.</summary>
/// <param name="To">The variable of the place that is entered.</param>
/// <param name="Probability">The chance; null for the only target.</param>
internal sealed record MoveTarget(int To, NumberExpr? Probability);
