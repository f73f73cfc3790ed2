namespace ChainSolve.Expressions;

/// <summary>What expressions read.</summary>
/// <param name="Givens">The indices of the givens.</param>
/// <param name="Variables">The indices of the variables.</param>
internal sealed record ExprReads(IReadOnlySet<int> Givens, IReadOnlySet<int> Variables)
{
    public static ExprReads Of(IEnumerable<Expr> roots)
    {
        var givens = new HashSet<int>();
        var variables = new HashSet<int>();
        foreach (var expr in ExprChildren.CountReferences(roots).Keys)
        {
            switch (expr)
            {
                case GivenExpr given:
                    givens.Add(given.Index);
                    break;
                case VariableExpr variable:
                    variables.Add(variable.Index);
                    break;
            }
        }

        return new ExprReads(givens, variables);
    }
}
