namespace ChainSolve.Expressions;

/// <summary>A fixed truth value.</summary>
internal sealed class TruthExpr(bool value) : ConditionExpr
{
    public bool Value { get; } = value;
}

/// <summary>A comparison of two numbers, exact.</summary>
internal sealed class CompareExpr(Comparison comparison, NumberExpr left, NumberExpr right) : ConditionExpr
{
    public Comparison Comparison { get; } = comparison;

    public NumberExpr Left { get; } = left;

    public NumberExpr Right { get; } = right;

    /// <summary>Whether it is false where a side has no value; otherwise it has no value either.</summary>
    public bool IsFalseIfUndefined { get; init; }
}

/// <summary>The comparisons.</summary>
internal enum Comparison
{
    Equal,
    NotEqual,
    Less,
    LessOrEqual,
    Greater,
    GreaterOrEqual,
}

/// <summary>True where all operands are; evaluated from the left and no further than needed.</summary>
internal sealed class AllExpr(IReadOnlyList<ConditionExpr> operands) : ConditionExpr
{
    public IReadOnlyList<ConditionExpr> Operands { get; } = operands;
}

/// <summary>True where one operand is; evaluated from the left and no further than needed.</summary>
internal sealed class AnyExpr(IReadOnlyList<ConditionExpr> operands) : ConditionExpr
{
    public IReadOnlyList<ConditionExpr> Operands { get; } = operands;
}

/// <summary>The opposite.</summary>
internal sealed class NotExpr(ConditionExpr operand) : ConditionExpr
{
    public ConditionExpr Operand { get; } = operand;
}

/// <summary>One of two conditions; the other is not evaluated.</summary>
internal sealed class ChooseConditionExpr(ConditionExpr condition, ConditionExpr whenTrue, ConditionExpr whenFalse) : ConditionExpr
{
    public ConditionExpr Condition { get; } = condition;

    public ConditionExpr WhenTrue { get; } = whenTrue;

    public ConditionExpr WhenFalse { get; } = whenFalse;
}
