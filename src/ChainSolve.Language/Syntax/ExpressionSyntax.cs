namespace ChainSolve.Language.Syntax;

/// <summary>An expression: a number or a condition.</summary>
public abstract record ExpressionSyntax : SyntaxNode;

/// <summary>A number without its unit.</summary>
public sealed record NumberSyntax : ExpressionSyntax
{
    /// <summary>The value; finite.</summary>
    public required double Value { get; init; }

    /// <summary>The number as written, underscores included.</summary>
    public required string Text { get; init; }
}

/// <summary>A unit behind a number or a bracket: <c>9 h</c>, <c>(a + b) d</c>, <c>5 %</c>.</summary>
public sealed record UnitSyntax : ExpressionSyntax
{
    /// <summary>The number or bracket that the unit belongs to.</summary>
    public required ExpressionSyntax Operand { get; init; }

    /// <summary>The unit word as written.</summary>
    public required Identifier Unit { get; init; }
}

/// <summary>A name: a given, a let, a local, a counter, a reward, or a parameter.</summary>
public sealed record NameSyntax : ExpressionSyntax
{
    /// <summary>The name.</summary>
    public required Identifier Name { get; init; }
}

/// <summary>A call of a built-in function or of a <c>let</c> with parameters.</summary>
public sealed record CallSyntax : ExpressionSyntax
{
    /// <summary>What is called.</summary>
    public required Identifier Function { get; init; }

    /// <summary>The arguments, in order.</summary>
    public required IReadOnlyList<ExpressionSyntax> Arguments { get; init; }
}

/// <summary><c>item.state</c>: how many replicas of the item are in the state.</summary>
public sealed record MemberSyntax : ExpressionSyntax
{
    /// <summary>The item.</summary>
    public required Identifier Owner { get; init; }

    /// <summary>The state.</summary>
    public required Identifier Member { get; init; }
}

/// <summary><c>item is state</c>: whether a single item is in the state.</summary>
public sealed record IsSyntax : ExpressionSyntax
{
    /// <summary>The item.</summary>
    public required Identifier Owner { get; init; }

    /// <summary>The state.</summary>
    public required Identifier Member { get; init; }
}

/// <summary>An expression in round brackets.</summary>
public sealed record BracketSyntax : ExpressionSyntax
{
    /// <summary>What stands between the brackets.</summary>
    public required ExpressionSyntax Inner { get; init; }
}

/// <summary>Unary minus or <c>not</c>.</summary>
public sealed record UnarySyntax : ExpressionSyntax
{
    /// <summary>The operator.</summary>
    public required UnaryOperator Operator { get; init; }

    /// <summary>The operand.</summary>
    public required ExpressionSyntax Operand { get; init; }
}

/// <summary>A power or a comparison: the operators that take exactly two operands.</summary>
public sealed record BinarySyntax : ExpressionSyntax
{
    /// <summary>The operator.</summary>
    public required BinaryOperator Operator { get; init; }

    /// <summary>The left operand.</summary>
    public required ExpressionSyntax Left { get; init; }

    /// <summary>The right operand.</summary>
    public required ExpressionSyntax Right { get; init; }
}

/// <summary>
/// A run of operators of one level, evaluated from the left and kept flat so that its length costs no depth:
/// <c>a + b - c</c>, <c>a * b / c per h</c>, <c>p or q or r</c>, <c>p and q</c>.
/// </summary>
public sealed record ChainSyntax : ExpressionSyntax
{
    /// <summary>The first operand.</summary>
    public required ExpressionSyntax First { get; init; }

    /// <summary>The further operands with the operator before each; at least one.</summary>
    public required IReadOnlyList<ChainLink> Rest { get; init; }
}

/// <summary>An operator and the operand behind it, in a <see cref="ChainSyntax"/>.</summary>
public sealed record ChainLink : SyntaxNode
{
    /// <summary>The operator.</summary>
    public required ChainOperator Operator { get; init; }

    /// <summary>The operand; for <see cref="ChainOperator.Per"/> a <see cref="PerUnitSyntax"/>.</summary>
    public required ExpressionSyntax Operand { get; init; }
}

/// <summary>What stands behind <c>per</c>: <c>h</c> or <c>1000 h</c>.</summary>
public sealed record PerUnitSyntax : ExpressionSyntax
{
    /// <summary>The number before the unit, if one is written.</summary>
    public required NumberSyntax? Count { get; init; }

    /// <summary>The unit word as written.</summary>
    public required Identifier Unit { get; init; }
}

/// <summary><c>if c then a else b</c>.</summary>
public sealed record ConditionalSyntax : ExpressionSyntax
{
    /// <summary>The condition.</summary>
    public required ExpressionSyntax Condition { get; init; }

    /// <summary>The value where the condition holds.</summary>
    public required ExpressionSyntax WhenTrue { get; init; }

    /// <summary>The value elsewhere.</summary>
    public required ExpressionSyntax WhenFalse { get; init; }
}
