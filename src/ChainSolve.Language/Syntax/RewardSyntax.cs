namespace ChainSolve.Language.Syntax;

/// <summary><c>reward NAME [in "UNIT"] = EXPR [while COND]</c> or <c>reward NAME [in "UNIT"] { … }</c>.</summary>
public sealed record RewardSyntax : StatementSyntax
{
    /// <summary>The name.</summary>
    public required Identifier Name { get; init; }

    /// <summary>The unit shown beside totals, if written.</summary>
    public required string? Unit { get; init; }

    /// <summary>The terms; a reward written with <c>=</c> has one <see cref="RateTermSyntax"/>.</summary>
    public required IReadOnlyList<RewardTermSyntax> Terms { get; init; }

    /// <summary>Whether it was written with <c>=</c>.</summary>
    public required bool IsShort { get; init; }
}

/// <summary>A term of a reward.</summary>
public abstract record RewardTermSyntax : SyntaxNode
{
    /// <summary>The condition under which the term is earned.</summary>
    public required ExpressionSyntax? While { get; init; }
}

/// <summary><c>rate EXPR [while COND]</c>: earned per unit time.</summary>
public sealed record RateTermSyntax : RewardTermSyntax
{
    /// <summary>The rate.</summary>
    public required ExpressionSyntax Rate { get; init; }
}

/// <summary><c>each EVENT | ITEM.MOVE [EXPR] [while COND]</c>: earned at an occurrence.</summary>
public sealed record EachTermSyntax : RewardTermSyntax
{
    /// <summary>The event, or the item whose move is meant.</summary>
    public required Identifier Source { get; init; }

    /// <summary>The move; null where <see cref="Source"/> is an event.</summary>
    public required Identifier? Move { get; init; }

    /// <summary>The amount; null means 1.</summary>
    public required ExpressionSyntax? Amount { get; init; }
}
