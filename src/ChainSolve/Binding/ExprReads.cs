using ChainSolve.Expressions;

namespace ChainSolve.Binding;

/// <summary>Finds what expressions read, each shared node once and without recursion.</summary>
internal static class ExprReads
{
    /// <summary>The indices of the givens that any of the expressions reads.</summary>
    public static HashSet<int> Givens(IEnumerable<Expr> roots) => [.. All(roots).OfType<GivenExpr>().Select(g => g.Index)];

    /// <summary>Whether any of the expressions reads the state.</summary>
    public static bool AnyReadsState(IEnumerable<Expr> roots) => All(roots).Any(e => e is VariableExpr);

    /// <summary>The nodes that a node is made of.</summary>
    public static IEnumerable<Expr> Parts(Expr expr) => expr switch
    {
        SumExpr sum => sum.Terms.Select(t => t.Value),
        ProductExpr product => product.Factors.Select(f => f.Value),
        NegateExpr negative => [negative.Operand],
        PowerExpr power => [power.Base, power.Exponent],
        FunctionExpr function => function.Arguments,
        CountExpr count => count.Conditions,
        ChooseNumberExpr choice => [choice.Condition, choice.WhenTrue, choice.WhenFalse],
        ChooseConditionExpr choice => [choice.Condition, choice.WhenTrue, choice.WhenFalse],
        CompareExpr comparison => [comparison.Left, comparison.Right],
        AllExpr all => all.Operands,
        AnyExpr any => any.Operands,
        NotExpr not => [not.Operand],
        _ => [],
    };

    private static IEnumerable<Expr> All(IEnumerable<Expr> roots)
    {
        var seen = new HashSet<Expr>(ReferenceEqualityComparer.Instance);
        var open = new Stack<Expr>(roots);
        while (open.TryPop(out var expr))
        {
            if (!seen.Add(expr))
            {
                continue;
            }

            yield return expr;
            foreach (var part in Parts(expr))
            {
                open.Push(part);
            }
        }
    }
}
