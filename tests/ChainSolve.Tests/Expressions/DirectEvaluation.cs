using ChainSolve.Expressions;

namespace ChainSolve.Tests.Expressions;

/// <summary>Evaluates expressions by plain recursion: slow, short, and independent of the back ends.</summary>
internal static class DirectEvaluation
{
    public static double Of(Expr expr, int[] marking, double[] givens)
    {
        double Number(NumberExpr e) => Of(e, marking, givens);
        bool Holds(ConditionExpr e) => Of(e, marking, givens) != 0;
        return expr switch
        {
            ConstantExpr e => e.Value,
            GivenExpr e => givens[e.Index],
            VariableExpr e => marking[e.Index],
            SumExpr e => e.Terms.Count == 0 ? 0 : e.Terms.Skip(1).Aggregate(
                e.Terms[0].IsSubtracted ? -Number(e.Terms[0].Value) : Number(e.Terms[0].Value),
                (sum, t) => t.IsSubtracted ? sum - Number(t.Value) : sum + Number(t.Value)),
            ProductExpr e => e.Factors.Aggregate(1.0, (product, f) => f.IsDivided ? product / Number(f.Value) : product * Number(f.Value)),
            NegateExpr e => -Number(e.Operand),
            PowerExpr e => Math.Pow(Number(e.Base), Number(e.Exponent)),
            FunctionExpr e => Function(e.Function, [.. e.Arguments.Select(Number)]),
            CountExpr e => e.Conditions.Count(Holds),
            ChooseNumberExpr e => Holds(e.Condition) ? Number(e.WhenTrue) : Number(e.WhenFalse),
            TruthExpr e => e.Value ? 1 : 0,
            CompareExpr e => Compare(e.Comparison, Number(e.Left), Number(e.Right)) ? 1 : 0,
            AllExpr e => e.Operands.All(Holds) ? 1 : 0,
            AnyExpr e => e.Operands.Any(Holds) ? 1 : 0,
            NotExpr e => Holds(e.Operand) ? 0 : 1,
            ChooseConditionExpr e => (Holds(e.Condition) ? Holds(e.WhenTrue) : Holds(e.WhenFalse)) ? 1 : 0,
            _ => throw new ArgumentException(expr.GetType().Name),
        };
    }

    private static bool Compare(Comparison comparison, double x, double y) => comparison switch
    {
        Comparison.Equal => x == y,
        Comparison.NotEqual => x != y,
        Comparison.Less => x < y,
        Comparison.LessOrEqual => x <= y,
        Comparison.Greater => x > y,
        _ => x >= y,
    };

    private static double Function(BuiltInFunction function, double[] x) => function switch
    {
        BuiltInFunction.Min => x.Aggregate(Math.Min),
        BuiltInFunction.Max => x.Aggregate(Math.Max),
        BuiltInFunction.Abs => Math.Abs(x[0]),
        BuiltInFunction.Floor => Math.Floor(x[0]),
        BuiltInFunction.Ceil => Math.Ceiling(x[0]),
        BuiltInFunction.Round => Math.Round(x[0], MidpointRounding.AwayFromZero),
        BuiltInFunction.Exp => Math.Exp(x[0]),
        BuiltInFunction.Ln => Math.Log(x[0]),
        BuiltInFunction.Sqrt => Math.Sqrt(x[0]),
        _ => ScalarMath.Choose(x[0], x[1]),
    };
}
