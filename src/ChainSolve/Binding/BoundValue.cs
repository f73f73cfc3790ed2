using ChainSolve.Expressions;

namespace ChainSolve.Binding;

/// <summary>An expression with what the rules of the notation need to know about it.</summary>
/// <param name="ReadsState">Whether its value can differ between states.</param>
internal abstract record BoundValue(bool ReadsState)
{
    public abstract Expr Node { get; }
}

/// <summary>A number.</summary>
internal sealed record Quantity(NumberExpr Expr, Dimension Dimension, bool ReadsState) : BoundValue(ReadsState)
{
    public override Expr Node => Expr;
}

/// <summary>A condition.</summary>
internal sealed record Truth(ConditionExpr Expr, bool ReadsState) : BoundValue(ReadsState)
{
    public override Expr Node => Expr;
}
