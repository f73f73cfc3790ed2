using ChainSolve.Expressions;

namespace ChainSolve.Binding;

/// <summary>Makes expression nodes and works out what is fixed, in the order in which it would be computed later.</summary>
internal static class ExprNodes
{
    public static NumberExpr Number(double value) => new ConstantExpr(value);

    public static NumberExpr Negate(NumberExpr operand) =>
        operand is ConstantExpr constant ? Number(-constant.Value) : new NegateExpr(operand);

    public static NumberExpr Sum(IReadOnlyList<SumTerm> terms)
    {
        var kept = new List<SumTerm>(terms.Count);
        foreach (var term in terms)
        {
            if (kept.Count == 1 && kept[0] is { Value: ConstantExpr before } && term.Value is ConstantExpr constant)
            {
                var signed = kept[0].IsSubtracted ? -before.Value : before.Value;
                kept[0] = new SumTerm(Number(term.IsSubtracted ? signed - constant.Value : signed + constant.Value), false);
            }
            else
            {
                kept.Add(term);
            }
        }

        return kept is [{ IsSubtracted: false, Value: var only }] ? only : new SumExpr(kept);
    }

    public static NumberExpr Product(IReadOnlyList<ProductFactor> factors)
    {
        var kept = new List<ProductFactor>(factors.Count);
        foreach (var factor in factors)
        {
            if (factor.Value is not ConstantExpr constant)
            {
                kept.Add(factor);
            }
            else if (kept is [{ IsDivided: false, Value: ConstantExpr before }] && (constant.Value != 0 || !factor.IsDivided))
            {
                kept[0] = new ProductFactor(Number(factor.IsDivided ? before.Value / constant.Value : before.Value * constant.Value), false);
            }
            else if (constant.Value != 1)
            {
                kept.Add(factor);
            }
        }

        return kept switch
        {
            [] => Number(1),
            [{ IsDivided: false, Value: var only }] => only,
            [{ IsDivided: true }, ..] => new ProductExpr([new ProductFactor(Number(1), false), .. kept]),
            _ => new ProductExpr(kept),
        };
    }

    public static NumberExpr Difference(NumberExpr left, NumberExpr right) =>
        Sum([new SumTerm(left, false), new SumTerm(right, true)]);

    public static NumberExpr Quotient(NumberExpr numerator, NumberExpr denominator) =>
        Product([new ProductFactor(numerator, false), new ProductFactor(denominator, true)]);

    public static NumberExpr Scale(NumberExpr value, double multiply, double divide) => Product(
        [new ProductFactor(value, false), new ProductFactor(Number(multiply), false), new ProductFactor(Number(divide), true)]);

    public static NumberExpr Power(NumberExpr @base, NumberExpr exponent) =>
        @base is ConstantExpr b && exponent is ConstantExpr e ? Number(Math.Pow(b.Value, e.Value)) : new PowerExpr(@base, exponent);

    public static NumberExpr Function(BuiltInFunction function, IReadOnlyList<NumberExpr> arguments) => new FunctionExpr(function, arguments);

    public static NumberExpr Count(IReadOnlyList<ConditionExpr> conditions) => new CountExpr(conditions);

    public static NumberExpr Choose(ConditionExpr condition, NumberExpr whenTrue, NumberExpr whenFalse) =>
        condition is TruthExpr truth ? (truth.Value ? whenTrue : whenFalse) : new ChooseNumberExpr(condition, whenTrue, whenFalse);

    public static ConditionExpr Choose(ConditionExpr condition, ConditionExpr whenTrue, ConditionExpr whenFalse) =>
        condition is TruthExpr truth ? (truth.Value ? whenTrue : whenFalse) : new ChooseConditionExpr(condition, whenTrue, whenFalse);

    public static ConditionExpr Not(ConditionExpr operand) =>
        operand is TruthExpr truth ? new TruthExpr(!truth.Value) : new NotExpr(operand);

    public static ConditionExpr Compare(Comparison comparison, NumberExpr left, NumberExpr right)
    {
        if (left is not ConstantExpr { Value: var a } || right is not ConstantExpr { Value: var b })
        {
            return new CompareExpr(comparison, left, right);
        }

        return new TruthExpr(comparison switch
        {
            Comparison.Equal => a == b,
            Comparison.NotEqual => a != b,
            Comparison.Less => a < b,
            Comparison.LessOrEqual => a <= b,
            Comparison.Greater => a > b,
            _ => a >= b,
        });
    }

    public static ConditionExpr All(IReadOnlyList<ConditionExpr> operands)
    {
        var open = operands.Where(o => o is not TruthExpr { Value: true }).ToList();
        return open switch
        {
            [] => new TruthExpr(true),
            [var only] => only,
            _ => new AllExpr(open),
        };
    }

    public static ConditionExpr Any(IReadOnlyList<ConditionExpr> operands)
    {
        var open = operands.Where(o => o is not TruthExpr { Value: false }).ToList();
        return open switch
        {
            [] => new TruthExpr(false),
            [var only] => only,
            _ => new AnyExpr(open),
        };
    }
}
