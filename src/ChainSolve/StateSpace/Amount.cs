using ChainSolve.Expressions;

namespace ChainSolve.StateSpace;

/// <summary>A number of an effect: fixed, or an output of the program that belongs to the transition.</summary>
internal readonly record struct Amount(double Fixed, int Output)
{
    /// <summary>Makes an amount; what is not fixed is added to the expressions of the program.</summary>
    public static Amount Of(NumberExpr expr, List<Expr> outputs)
    {
        if (expr is ConstantExpr constant)
        {
            return new Amount(constant.Value, -1);
        }

        outputs.Add(expr);
        return new Amount(0, outputs.Count - 1);
    }

    public double Read(ReadOnlySpan<double> outputs) => Output < 0 ? Fixed : outputs[Output];
}
