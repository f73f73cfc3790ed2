using ChainSolve.Expressions;
using ChainSolve.Modelling;

namespace ChainSolve.Binding;

/// <summary>Works out the values of givens, and of expressions that read givens only.</summary>
internal static class GivenEvaluator
{
    /// <summary>The values in order: those that are set, and for the others what their own expressions give.</summary>
    public static double[] Evaluate(IReadOnlyList<BoundGiven> givens, IReadOnlyList<double?> set)
    {
        var values = new double[givens.Count];
        for (var i = 0; i < values.Length; i++)
        {
            values[i] = set[i] ?? ValueOf(givens[i].Default, values);
        }

        return values;
    }

    public static double ValueOf(NumberExpr expr, double[] givens)
    {
        if (expr is ConstantExpr constant)
        {
            return constant.Value;
        }

        Span<double> value = stackalloc double[1];
        ExprCompiler.Compile([expr], ExprBackEnd.Interpreted).Run([], givens, value);
        return value[0];
    }
}
