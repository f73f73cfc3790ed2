using ChainSolve.Expressions;

namespace ChainSolve.Tests.Expressions;

/// <summary>Random expression graphs over three variables and two givens, with shared nodes.</summary>
internal sealed class RandomExprs(int seed)
{
    private readonly Random random = new(seed);
    private readonly List<NumberExpr> numbers =
    [
        new ConstantExpr(0), new ConstantExpr(1.5), new ConstantExpr(-2), new ConstantExpr(3),
        new GivenExpr(0), new GivenExpr(1), new VariableExpr(0), new VariableExpr(1), new VariableExpr(2),
    ];

    private readonly List<ConditionExpr> conditions = [new TruthExpr(true), new TruthExpr(false)];

    public IReadOnlyList<Expr> Make(int count)
    {
        for (var i = 0; i < count; i++)
        {
            if (random.Next(3) == 0)
            {
                conditions.Add(Condition());
            }
            else
            {
                numbers.Add(Number());
            }
        }

        return [.. numbers.TakeLast(8), .. conditions.TakeLast(4)];
    }

    private NumberExpr AnyNumber() => numbers[random.Next(numbers.Count)];

    private ConditionExpr AnyCondition() => conditions[random.Next(conditions.Count)];

    private NumberExpr Number() => random.Next(9) switch
    {
        0 => new SumExpr([.. Enumerable.Range(0, random.Next(4)).Select(_ => new SumTerm(AnyNumber(), random.Next(2) == 0))]),
        1 => new ProductExpr([.. Enumerable.Range(0, random.Next(4)).Select(_ => new ProductFactor(AnyNumber(), random.Next(2) == 0))]),
        2 => new NegateExpr(AnyNumber()),
        3 => new PowerExpr(AnyNumber(), AnyNumber()),
        4 => new FunctionExpr(Unary[random.Next(Unary.Length)], [AnyNumber()]),
        5 => new FunctionExpr(random.Next(2) == 0 ? BuiltInFunction.Min : BuiltInFunction.Max, [AnyNumber(), AnyNumber(), AnyNumber()]),
        6 => new FunctionExpr(BuiltInFunction.Choose, [AnyNumber(), AnyNumber()]),
        7 => new CountExpr([AnyCondition(), AnyCondition(), AnyCondition()]),
        _ => new ChooseNumberExpr(AnyCondition(), AnyNumber(), AnyNumber()),
    };

    private ConditionExpr Condition() => random.Next(5) switch
    {
        0 => new AllExpr([AnyCondition(), AnyCondition(), AnyCondition()]),
        1 => new AnyExpr([AnyCondition(), AnyCondition()]),
        2 => new NotExpr(AnyCondition()),
        3 => new ChooseConditionExpr(AnyCondition(), AnyCondition(), AnyCondition()),
        _ => new CompareExpr((Comparison)random.Next(6), AnyNumber(), AnyNumber()),
    };

    private static readonly BuiltInFunction[] Unary =
    [
        BuiltInFunction.Abs, BuiltInFunction.Floor, BuiltInFunction.Ceil, BuiltInFunction.Round, BuiltInFunction.Exp, BuiltInFunction.Ln,
        BuiltInFunction.Sqrt,
    ];
}
