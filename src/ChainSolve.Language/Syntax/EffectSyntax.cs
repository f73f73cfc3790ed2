namespace ChainSolve.Language.Syntax;

/// <summary>One line of what happens in an instant.</summary>
public abstract record EffectSyntax : SyntaxNode;

/// <summary><c>COUNTER = EXPR</c>.</summary>
public sealed record AssignSyntax : EffectSyntax
{
    /// <summary>The counter.</summary>
    public required Identifier Counter { get; init; }

    /// <summary>The new value, read in the state before.</summary>
    public required ExpressionSyntax Value { get; init; }
}

/// <summary><c>ITEM: a -> b [x K | all] [if any]</c> or <c>ITEM: a -> b P, c Q [x K] [if any]</c>.</summary>
public sealed record ItemMoveSyntax : EffectSyntax
{
    /// <summary>The item.</summary>
    public required Identifier Item { get; init; }

    /// <summary>The state that is left.</summary>
    public required Identifier From { get; init; }

    /// <summary>The targets; one without a share, or several with one each.</summary>
    public required IReadOnlyList<StateShareSyntax> Targets { get; init; }

    /// <summary>How many replicas move; null means one, unless <see cref="MovesAll"/>.</summary>
    public required ExpressionSyntax? Count { get; init; }

    /// <summary>Whether all that the other lines leave in the state move.</summary>
    public required bool MovesAll { get; init; }

    /// <summary>Whether the line is skipped where it is not possible.</summary>
    public required bool IfAny { get; init; }
}
