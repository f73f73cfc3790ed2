namespace ChainSolve.Language.Syntax;

/// <summary><c>item a x n (local = …), b { … }</c>: one or more separate items with one body.</summary>
public sealed record ItemSyntax : StatementSyntax
{
    /// <summary>The items that share the body; at least one.</summary>
    public required IReadOnlyList<ItemHeadSyntax> Heads { get; init; }

    /// <summary>The clauses of the body, in order.</summary>
    public required IReadOnlyList<ItemClauseSyntax> Clauses { get; init; }
}

/// <summary>The name, count and locals of one item.</summary>
public sealed record ItemHeadSyntax : SyntaxNode
{
    /// <summary>The name.</summary>
    public required Identifier Name { get; init; }

    /// <summary>The count behind <c>x</c>; null for a single item.</summary>
    public required ExpressionSyntax? Count { get; init; }

    /// <summary>The local names; empty where none are written.</summary>
    public required IReadOnlyList<LocalSyntax> Locals { get; init; }
}

/// <summary>A local name of an item: <c>NAME = EXPR</c>.</summary>
public sealed record LocalSyntax : SyntaxNode
{
    /// <summary>The name.</summary>
    public required Identifier Name { get; init; }

    /// <summary>The value; may read the state.</summary>
    public required ExpressionSyntax Value { get; init; }
}

/// <summary>A clause in the body of an item.</summary>
public abstract record ItemClauseSyntax : SyntaxNode;

/// <summary><c>states a, b, c</c>: fixes the order of the states.</summary>
public sealed record StatesSyntax : ItemClauseSyntax
{
    /// <summary>The states in order.</summary>
    public required IReadOnlyList<Identifier> States { get; init; }
}

/// <summary><c>start a</c>, <c>start a 2, b 1</c> or <c>start a 0.25, c 0.75</c>.</summary>
public sealed record StartSyntax : ItemClauseSyntax
{
    /// <summary>The shares; at least one.</summary>
    public required IReadOnlyList<StateShareSyntax> Shares { get; init; }
}

/// <summary>A state with the number behind it: a count at the start, or the probability of a drawn target.</summary>
public sealed record StateShareSyntax : SyntaxNode
{
    /// <summary>The state.</summary>
    public required Identifier State { get; init; }

    /// <summary>The count or probability; null where none is written.</summary>
    public required ExpressionSyntax? Share { get; init; }
}

/// <summary><c>a -> b at RATE …</c>, <c>a -> b P, c Q at RATE …</c> or <c>a -> b after DELAY …</c>.</summary>
public sealed record MoveSyntax : ItemClauseSyntax
{
    /// <summary>The state that is left.</summary>
    public required Identifier From { get; init; }

    /// <summary>The targets; one without a share, or several with one each.</summary>
    public required IReadOnlyList<StateShareSyntax> Targets { get; init; }

    /// <summary>The rate per replica; null where the move is written with <c>after</c>.</summary>
    public required ExpressionSyntax? Rate { get; init; }

    /// <summary>The delay; null where the move is written with <c>at</c>.</summary>
    public required DelaySyntax? Delay { get; init; }

    /// <summary>The condition under which the move can happen.</summary>
    public required ExpressionSyntax? When { get; init; }

    /// <summary>The crew that serves the move.</summary>
    public required Identifier? Crew { get; init; }

    /// <summary>The rank in a ranked crew.</summary>
    public required ExpressionSyntax? Rank { get; init; }

    /// <summary>The name that <c>each</c> refers to.</summary>
    public required Identifier? Name { get; init; }

    /// <summary>What else happens in the same instant; may be empty.</summary>
    public required IReadOnlyList<EffectSyntax> Effects { get; init; }
}

/// <summary><c>mean m</c>: an exponential delay with the mean m.</summary>
public sealed record DelaySyntax : SyntaxNode
{
    /// <summary>The mean.</summary>
    public required ExpressionSyntax Mean { get; init; }
}
