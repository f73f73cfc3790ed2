using ChainSolve.Expressions;

namespace ChainSolve.Tests.Expressions;

/// <summary>Evaluates expressions by plain recursion: slow, short, and independent of the back ends.</summary>
internal static class DirectEvaluation
{
    public static double Of(Expr expr, int[] marking, double[] givens)
    {
        double Number(NumberExpr e) => Of(e, marking, givens);
        double Truth(ConditionExpr e) => Of(e, marking, givens);
        double Choice(ConditionExpr condition, Expr whenTrue, Expr whenFalse) =>
            Truth(condition) is var c && c == 0 ? Of(whenFalse, marking, givens) : Of(whenTrue, marking, givens) * c;
        return expr switch
        {
            ConstantExpr e => e.Value,
            GivenExpr e => givens[e.Index],
            VariableExpr e => marking[e.Index],
            SumExpr e => e.Terms.Count == 0 ? 0 : e.Terms.Skip(1).Aggregate(
                e.Terms[0].IsSubtracted ? -Number(e.Terms[0].Value) : Number(e.Terms[0].Value),
                (sum, t) => t.IsSubtracted ? sum - Number(t.Value) : sum + Number(t.Value)),
            ProductExpr e => e.Factors.Aggregate(1.0, (product, f) => f.IsDivided ? Quotient(product, Number(f.Value)) : product * Number(f.Value)),
            NegateExpr e => -Number(e.Operand),
            PowerExpr e => Math.Pow(Number(e.Base), Number(e.Exponent)),
            FunctionExpr e => Function(e.Function, [.. e.Arguments.Select(Number)]),
            CountExpr e => e.Conditions.Sum(Truth),
            ChooseNumberExpr e => Choice(e.Condition, e.WhenTrue, e.WhenFalse),
            TruthExpr e => e.Value ? 1 : 0,
            CompareExpr e => Compare(e.Comparison, Number(e.Left), Number(e.Right)),
            AllExpr e => e.Operands.Select(Truth).TakeUntil(t => t == 0).Aggregate(1.0, (all, t) => t == 0 ? 0 : all * t),
            AnyExpr e => e.Operands.Select(Truth).TakeUntil(t => t != 0).LastOrDefault(),
            NotExpr e => 1 - Truth(e.Operand),
            ChooseConditionExpr e => Choice(e.Condition, e.WhenTrue, e.WhenFalse),
            _ => throw new ArgumentException(expr.GetType().Name),
        };
    }

    // A comparison with what is no number has no truth.
    private static double Compare(Comparison comparison, double x, double y) => !double.IsFinite(x) || !double.IsFinite(y) ? double.NaN : comparison switch
    {
        Comparison.Equal => x == y,
        Comparison.NotEqual => x != y,
        Comparison.Less => x < y,
        Comparison.LessOrEqual => x <= y,
        Comparison.Greater => x > y,
        _ => x >= y,
    } ? 1 : 0;

    private static double Quotient(double x, double y) => y == 0 ? double.NaN : x / y;

    private static IEnumerable<double> TakeUntil(this IEnumerable<double> values, Func<double, bool> isLast)
    {
        foreach (var value in values)
        {
            yield return value;
            if (isLast(value))
            {
                yield break;
            }
        }
    }

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
