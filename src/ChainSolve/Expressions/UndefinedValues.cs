namespace ChainSolve.Expressions;

/// <summary>Tells which expressions may have no finite value in some state: those that divide, take powers or logarithms, and what is made of them.</summary>
internal static class UndefinedValues
{
    public static HashSet<Expr> Of(IEnumerable<Expr> roots)
    {
        var undefined = new HashSet<Expr>(ReferenceEqualityComparer.Instance);
        foreach (var expr in ExprChildren.ChildrenFirst(roots))
        {
            if (MayBe(expr) || (ExprChildren.Of(expr).Any(undefined.Contains) && expr is not CompareExpr { IsFalseIfUndefined: true }))
            {
                undefined.Add(expr);
            }
        }

        return undefined;
    }

    private static bool MayBe(Expr expr) => expr switch
    {
        ProductExpr product => product.Factors.Any(f => f.IsDivided && f.Value is not ConstantExpr { Value: not 0 }),
        PowerExpr => true,
        FunctionExpr { Function: BuiltInFunction.Ln or BuiltInFunction.Sqrt or BuiltInFunction.Choose or BuiltInFunction.Exp } => true,
        ConstantExpr constant => !double.IsFinite(constant.Value),
        _ => false,
    };
}
