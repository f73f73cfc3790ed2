namespace ChainSolve.Language.Syntax;

/// <summary>A statement at the top level of a model.</summary>
public abstract record StatementSyntax : SyntaxNode;

/// <summary><c>model "title"</c>.</summary>
public sealed record TitleSyntax : StatementSyntax
{
    /// <summary>The title, escapes resolved.</summary>
    public required string Title { get; init; }
}

/// <summary><c>timebase UNIT</c>.</summary>
public sealed record TimebaseSyntax : StatementSyntax
{
    /// <summary>The unit of results.</summary>
    public required Identifier Unit { get; init; }
}

/// <summary><c>given NAME = EXPR [in LO .. HI] [spread DIST]</c>.</summary>
public sealed record GivenSyntax : StatementSyntax
{
    /// <summary>The name.</summary>
    public required Identifier Name { get; init; }

    /// <summary>The value used when none is set from outside.</summary>
    public required ExpressionSyntax Value { get; init; }

    /// <summary>The admissible range, if given.</summary>
    public required RangeSyntax? Range { get; init; }

    /// <summary>The distribution behind <c>spread</c>, if given: a call such as <c>uniform(lo, hi)</c>.</summary>
    public required CallSyntax? Spread { get; init; }
}

/// <summary><c>LO .. HI</c>, where a bare low end has already taken the unit that ends the high end.</summary>
public sealed record RangeSyntax : SyntaxNode
{
    /// <summary>The low end.</summary>
    public required ExpressionSyntax Low { get; init; }

    /// <summary>The high end.</summary>
    public required ExpressionSyntax High { get; init; }
}

/// <summary><c>let NAME = EXPR</c> or <c>let NAME(a, b) = EXPR</c>.</summary>
public sealed record LetSyntax : StatementSyntax
{
    /// <summary>The name.</summary>
    public required Identifier Name { get; init; }

    /// <summary>The parameters; null where no brackets are written.</summary>
    public required IReadOnlyList<Identifier>? Parameters { get; init; }

    /// <summary>The value.</summary>
    public required ExpressionSyntax Value { get; init; }
}

/// <summary><c>crew NAME = COUNT [ranked]</c>.</summary>
public sealed record CrewSyntax : StatementSyntax
{
    /// <summary>The name.</summary>
    public required Identifier Name { get; init; }

    /// <summary>How many jobs are served at once.</summary>
    public required ExpressionSyntax Count { get; init; }

    /// <summary>Whether moves are served by rank.</summary>
    public required bool IsRanked { get; init; }
}

/// <summary><c>counter NAME LO .. HI [start V]</c>.</summary>
public sealed record CounterSyntax : StatementSyntax
{
    /// <summary>The name.</summary>
    public required Identifier Name { get; init; }

    /// <summary>The range.</summary>
    public required RangeSyntax Range { get; init; }

    /// <summary>The start value; null means the low end.</summary>
    public required ExpressionSyntax? Start { get; init; }
}

/// <summary><c>event NAME at RATE [when COND] { EFFECT … }</c>.</summary>
public sealed record EventSyntax : StatementSyntax
{
    /// <summary>The name.</summary>
    public required Identifier Name { get; init; }

    /// <summary>The rate of the event.</summary>
    public required ExpressionSyntax Rate { get; init; }

    /// <summary>The condition under which it can happen.</summary>
    public required ExpressionSyntax? When { get; init; }

    /// <summary>What happens, all at once; may be empty.</summary>
    public required IReadOnlyList<EffectSyntax> Effects { get; init; }
}
