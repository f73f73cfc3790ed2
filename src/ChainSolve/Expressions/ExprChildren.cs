namespace ChainSolve.Expressions;

/// <summary>The operands of expressions, for walks over whole graphs.</summary>
internal static class ExprChildren
{
    public static IReadOnlyList<Expr> Of(Expr expr) => expr switch
    {
        SumExpr sum => [.. sum.Terms.Select(t => t.Value)],
        ProductExpr product => [.. product.Factors.Select(f => f.Value)],
        NegateExpr negate => [negate.Operand],
        PowerExpr power => [power.Base, power.Exponent],
        FunctionExpr function => function.Arguments,
        CountExpr count => count.Conditions,
        ChooseNumberExpr choose => [choose.Condition, choose.WhenTrue, choose.WhenFalse],
        CompareExpr compare => [compare.Left, compare.Right],
        AllExpr all => all.Operands,
        AnyExpr any => any.Operands,
        NotExpr not => [not.Operand],
        ChooseConditionExpr choose => [choose.Condition, choose.WhenTrue, choose.WhenFalse],
        _ => [],
    };

    /// <summary>The nodes of the graphs, each once and behind those it refers to.</summary>
    public static List<Expr> ChildrenFirst(IEnumerable<Expr> roots)
    {
        var order = new List<Expr>();
        var seen = new HashSet<Expr>(ReferenceEqualityComparer.Instance);
        var open = new Stack<(Expr Expr, bool IsDone)>(roots.Reverse().Select(o => (o, false)));
        while (open.TryPop(out var next))
        {
            if (next.IsDone)
            {
                order.Add(next.Expr);
            }
            else if (seen.Add(next.Expr))
            {
                open.Push((next.Expr, true));
                foreach (var child in Of(next.Expr))
                {
                    open.Push((child, false));
                }
            }
        }

        return order;
    }

    /// <summary>How often each node of the graphs is referred to, from outside or from other nodes.</summary>
    public static Dictionary<Expr, int> CountReferences(IEnumerable<Expr> roots)
    {
        var counts = new Dictionary<Expr, int>(ReferenceEqualityComparer.Instance);
        var open = new Stack<Expr>(roots);
        while (open.TryPop(out var expr))
        {
            if (counts.TryGetValue(expr, out var count))
            {
                counts[expr] = count + 1;
                continue;
            }

            counts[expr] = 1;
            foreach (var child in Of(expr))
            {
                open.Push(child);
            }
        }

        return counts;
    }
}
