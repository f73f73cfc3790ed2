namespace ChainSolve.Expressions;

/// <summary>A fixed number.</summary>
internal sealed class ConstantExpr(double value) : NumberExpr
{
    public double Value { get; } = value;
}

/// <summary>The value of a given.</summary>
internal sealed class GivenExpr(int index) : NumberExpr
{
    /// <summary>Index into the model's givens.</summary>
    public int Index { get; } = index;
}

/// <summary>The number of replicas in a place, or the value of a counter.</summary>
internal sealed class VariableExpr(int index) : NumberExpr
{
    /// <summary>Index into the model's variables, and into a marking.</summary>
    public int Index { get; } = index;
}

/// <summary>The sum of its terms, added from the left; with no term 0.</summary>
internal sealed class SumExpr(IReadOnlyList<SumTerm> terms) : NumberExpr
{
    public IReadOnlyList<SumTerm> Terms { get; } = terms;
}

/// <summary>A term of a sum.</summary>
internal readonly record struct SumTerm(NumberExpr Value, bool IsSubtracted);

/// <summary>The product of its factors, multiplied and divided from the left; with no factor 1.</summary>
internal sealed class ProductExpr(IReadOnlyList<ProductFactor> factors) : NumberExpr
{
    public IReadOnlyList<ProductFactor> Factors { get; } = factors;
}

/// <summary>A factor of a product.</summary>
internal sealed record ProductFactor(NumberExpr Value, bool IsDivided);

/// <summary>The value with its sign changed.</summary>
internal sealed class NegateExpr(NumberExpr operand) : NumberExpr
{
    public NumberExpr Operand { get; } = operand;
}

/// <summary>A power.</summary>
internal sealed class PowerExpr(NumberExpr @base, NumberExpr exponent) : NumberExpr
{
    public NumberExpr Base { get; } = @base;

    public NumberExpr Exponent { get; } = exponent;
}

/// <summary>A built-in function of numbers.</summary>
internal sealed class FunctionExpr(BuiltInFunction function, IReadOnlyList<NumberExpr> arguments) : NumberExpr
{
    public BuiltInFunction Function { get; } = function;

    /// <summary>One argument, two for <see cref="BuiltInFunction.Choose"/>, one or more for the smallest and the largest.</summary>
    public IReadOnlyList<NumberExpr> Arguments { get; } = arguments;
}

/// <summary>The built-in functions of numbers.</summary>
internal enum BuiltInFunction
{
    Min,
    Max,
    Abs,
    Floor,
    Ceil,
    Round,
    Exp,
    Ln,
    Sqrt,
    Choose,
}

/// <summary>How many of the conditions hold.</summary>
internal sealed class CountExpr(IReadOnlyList<ConditionExpr> conditions) : NumberExpr
{
    public IReadOnlyList<ConditionExpr> Conditions { get; } = conditions;
}

/// <summary>One of two numbers; the other is not evaluated.</summary>
internal sealed class ChooseNumberExpr(ConditionExpr condition, NumberExpr whenTrue, NumberExpr whenFalse) : NumberExpr
{
    public ConditionExpr Condition { get; } = condition;

    public NumberExpr WhenTrue { get; } = whenTrue;

    public NumberExpr WhenFalse { get; } = whenFalse;
}
