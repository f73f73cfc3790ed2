using ChainSolve.Expressions;
using ChainSolve.Language.Syntax;
using ChainSolve.Language.Text;

namespace ChainSolve.Modelling;

/// <summary>Something to compute.</summary>
internal sealed record BoundMeasure
{
    public required string Name { get; init; }

    public required MeasureKind Kind { get; init; }

    public required MeasureScope Scope { get; init; }

    /// <summary>The measured condition; null where <see cref="Object"/> is given.</summary>
    public required ConditionExpr? Condition { get; init; }

    /// <summary>The measured object; null where <see cref="Condition"/> is given.</summary>
    public required Earning? Object { get; init; }

    /// <summary>The share of a quantile, reads givens only; null for other kinds.</summary>
    public required NumberExpr? Share { get; init; }

    /// <summary>The times; empty where the scope has none. They read givens only.</summary>
    public required IReadOnlyList<BoundTimes> Times { get; init; }

    /// <summary>The unit in which people see the times: the one that all of them share, otherwise the time base.</summary>
    public required OutsideUnit TimesUnit { get; init; }

    /// <summary>The condition behind <c>until</c>.</summary>
    public required ConditionExpr? Until { get; init; }

    /// <summary>The power of time of the values: 1 for a mean time, -1 for a failure intensity.</summary>
    public required int TimePower { get; init; }

    /// <summary>The unit of the values: the reward's own, or made from the time base; empty for plain numbers.</summary>
    public required string Unit { get; init; }

    /// <summary>The measure as written, from its kind on, on one line.</summary>
    public required string Sentence { get; init; }

    public required TextSpan Span { get; init; }
}

/// <summary>A part of the times of a measure.</summary>
internal abstract record BoundTimes
{
    public required TextSpan Span { get; init; }
}

/// <summary>A single time.</summary>
internal sealed record SingleTime : BoundTimes
{
    public required NumberExpr Time { get; init; }
}

/// <summary>Times from one to another at a fixed distance; the end is added if the step does not divide.</summary>
internal sealed record StepTimes : BoundTimes
{
    public required NumberExpr From { get; init; }

    public required NumberExpr To { get; init; }

    public required NumberExpr Step { get; init; }
}

/// <summary>Times from one to another with a fixed ratio between neighbours.</summary>
internal sealed record LogTimes : BoundTimes
{
    public required NumberExpr From { get; init; }

    public required NumberExpr To { get; init; }

    /// <summary>The number of points, ends included; a whole number of at least 2.</summary>
    public required NumberExpr Points { get; init; }
}
