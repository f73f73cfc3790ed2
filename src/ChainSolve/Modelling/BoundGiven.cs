using ChainSolve.Expressions;
using ChainSolve.Language.Text;

namespace ChainSolve.Modelling;

/// <summary>An input of the model.</summary>
internal sealed record BoundGiven
{
    public required string Name { get; init; }

    /// <summary>The value used when none is set; reads earlier givens only.</summary>
    public required NumberExpr Default { get; init; }

    /// <summary>The power of time: 0 plain, 1 time, -1 rate.</summary>
    public required int TimePower { get; init; }

    /// <summary>
    /// The unit in which a bare number from outside is read and the value is shown; null where the given's own
    /// expression ends in no single unit although its dimension is not plain.
    /// </summary>
    public required OutsideUnit? OutsideUnit { get; init; }

    /// <summary>The admissible range, ends included; null where none is written.</summary>
    public required (NumberExpr Low, NumberExpr High)? Range { get; init; }

    /// <summary>The distribution behind <c>spread</c>; null where none is written.</summary>
    public required BoundSpread? Spread { get; init; }

    /// <summary>Whether item counts, counter ranges or starts depend on it, so that other values need a new state space.</summary>
    public required bool ShapesStates { get; init; }

    public required TextSpan Span { get; init; }
}

/// <summary>A unit as people write it behind a number.</summary>
/// <param name="Text">As written: <c>h</c>, <c>per h</c>, <c>per 1000 h</c>, <c>%</c>; empty for a plain number.</param>
/// <param name="Factor">What a number with this unit is multiplied by to give the value in the model's time base.</param>
internal sealed record OutsideUnit(string Text, double Factor)
{
    /// <summary>No unit at all.</summary>
    public static OutsideUnit None { get; } = new("", 1);

    /// <summary><see cref="Factor"/> is this over <see cref="Divide"/>; both are whole numbers mostly, so that conversion rounds once.</summary>
    public double Multiply { get; init; } = Factor;

    public double Divide { get; init; } = 1;

    /// <summary>The value in the time base of a number with this unit.</summary>
    public double ToBase(double number) => number * Multiply / Divide;

    /// <summary>The number in this unit of a value in the time base.</summary>
    public double FromBase(double value) => value * Divide / Multiply;
}

/// <summary>A distribution of a given, read and kept.</summary>
/// <param name="Kind">The law.</param>
/// <param name="Parameters">Its parameters in the order of the notation; they read earlier givens only.</param>
internal sealed record BoundSpread(SpreadKind Kind, IReadOnlyList<NumberExpr> Parameters);

/// <summary>The laws of <c>spread</c>.</summary>
internal enum SpreadKind
{
    Uniform,
    Lognormal,
    Gamma,
    Beta,
    Triangular,
}
