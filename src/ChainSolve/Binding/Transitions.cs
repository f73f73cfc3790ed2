using ChainSolve.Expressions;
using ChainSolve.Modelling;

namespace ChainSolve.Binding;

/// <summary>Puts rate, number of replicas, crew and condition of a move together.</summary>
internal static class Transitions
{
    /// <summary>The condition under which a move can happen; null for always.</summary>
    /// <remarks>
    /// Rate and condition are those of a replica in the source: where there is none and they read the state, they are not
    /// even looked at, since they need not make sense there (such as 1/pump.up).
    /// </remarks>
    public static ConditionExpr? GuardOf(MoveDraft move)
    {
        var parts = new List<ConditionExpr>();
        if (move.Rate.ReadsState || move.When is { ReadsState: true })
        {
            parts.Add(ExprNodes.Compare(Comparison.Greater, move.Source, ExprNodes.Number(0)));
        }

        if (move.When is { } when)
        {
            parts.Add(when.Expr);
        }

        return parts.Count == 0 ? null : ExprNodes.All(parts);
    }

    public static BoundTransition Of(MoveDraft move, NumberExpr? share)
    {
        var factors = new List<ProductFactor> { new(move.Rate.Expr, false), new(move.Source, false) };
        if (share is not null)
        {
            factors.Add(new ProductFactor(share, false));
        }

        return new BoundTransition
        {
            Label = move.Label,
            Guard = GuardOf(move),
            Rate = ExprNodes.Product(factors),
            Effects = move.Effects,
            Span = move.Syntax.Span,
        };
    }
}
