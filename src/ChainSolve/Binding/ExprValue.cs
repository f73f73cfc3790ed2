using ChainSolve.Expressions;

namespace ChainSolve.Binding;

/// <summary>
/// Evaluates an expression once, node by node and without recursion. For the few values that are wanted while binding; what is
/// wanted in every state has faster ways.
/// </summary>
internal static class ExprValue
{
    /// <summary>The value; of a condition 1 or 0.</summary>
    /// <param name="root">The expression.</param>
    /// <param name="marking">One entry a variable; may be empty where no node reads the state.</param>
    /// <param name="givens">One entry a given.</param>
    public static double Of(Expr root, ReadOnlySpan<int> marking, ReadOnlySpan<double> givens)
    {
        var values = new Dictionary<Expr, double>(ReferenceEqualityComparer.Instance);
        var open = new Stack<(Expr Node, bool PartsDone)>([(root, false)]);
        while (open.TryPop(out var step))
        {
            if (values.ContainsKey(step.Node))
            {
                continue;
            }

            if (step.PartsDone)
            {
                values[step.Node] = Value(step.Node, values, marking, givens);
                continue;
            }

            open.Push((step.Node, true));
            foreach (var part in ExprReads.Parts(step.Node))
            {
                open.Push((part, false));
            }
        }

        return values[root];
    }

    private static double Value(Expr node, Dictionary<Expr, double> known, ReadOnlySpan<int> marking, ReadOnlySpan<double> givens) => node switch
    {
        ConstantExpr constant => constant.Value,
        GivenExpr given => givens[given.Index],
        VariableExpr variable => marking[variable.Index],
        NumberExpr number => Number(number, known),
        ConditionExpr condition => Holds(condition, known) ? 1 : 0,
        _ => throw Unknown(node),
    };

    private static double Number(NumberExpr node, Dictionary<Expr, double> known) => node switch
    {
        SumExpr sum => sum.Terms.Aggregate(0.0, (total, t) => t.IsSubtracted ? total - known[t.Value] : total + known[t.Value]),
        ProductExpr product => product.Factors.Aggregate(1.0, (total, f) => f.IsDivided ? total / known[f.Value] : total * known[f.Value]),
        NegateExpr negative => -known[negative.Operand],
        PowerExpr power => Math.Pow(known[power.Base], known[power.Exponent]),
        CountExpr count => count.Conditions.Count(c => known[c] != 0),
        ChooseNumberExpr choice => known[known[choice.Condition] != 0 ? choice.WhenTrue : choice.WhenFalse],
        FunctionExpr function => Apply(function.Function, [.. function.Arguments.Select(a => known[a])]),
        _ => throw Unknown(node),
    };

    private static bool Holds(ConditionExpr node, Dictionary<Expr, double> known) => node switch
    {
        TruthExpr truth => truth.Value,
        NotExpr not => known[not.Operand] == 0,
        AllExpr all => all.Operands.All(o => known[o] != 0),
        AnyExpr any => any.Operands.Any(o => known[o] != 0),
        ChooseConditionExpr choice => known[known[choice.Condition] != 0 ? choice.WhenTrue : choice.WhenFalse] != 0,
        CompareExpr comparison => Compare(comparison.Comparison, known[comparison.Left], known[comparison.Right]),
        _ => throw Unknown(node),
    };

    private static bool Compare(Comparison comparison, double left, double right) => comparison switch
    {
        Comparison.Equal => left == right,
        Comparison.NotEqual => left != right,
        Comparison.Less => left < right,
        Comparison.LessOrEqual => left <= right,
        Comparison.Greater => left > right,
        _ => left >= right,
    };

    private static double Apply(BuiltInFunction function, double[] x) => function switch
    {
        BuiltInFunction.Min => x.Min(),
        BuiltInFunction.Max => x.Max(),
        BuiltInFunction.Abs => Math.Abs(x[0]),
        BuiltInFunction.Floor => Math.Floor(x[0]),
        BuiltInFunction.Ceil => Math.Ceiling(x[0]),
        BuiltInFunction.Round => Math.Round(x[0], MidpointRounding.AwayFromZero),
        BuiltInFunction.Exp => Math.Exp(x[0]),
        BuiltInFunction.Ln => Math.Log(x[0]),
        BuiltInFunction.Sqrt => Math.Sqrt(x[0]),
        _ => Choose(x[0], x[1]),
    };

    // The binomial coefficient, factor by factor; small results stay exact.
    private static double Choose(double n, double k)
    {
        if (k != Math.Floor(k) || !(k >= 0) || !double.IsFinite(n))
        {
            return k < 0 ? 0 : double.NaN;
        }

        var result = 1.0;
        for (var i = 1; i <= k && result != 0; i++)
        {
            result = result * (n - k + i) / i;
        }

        return result;
    }

    private static ArgumentException Unknown(Expr node) => new($"Unknown expression {node.GetType().Name}.", nameof(node));
}
