namespace ChainSolve.Language.Syntax;

/// <summary><c>measure NAME = …</c>.</summary>
public sealed record MeasureSyntax : StatementSyntax
{
    /// <summary>The name.</summary>
    public required Identifier Name { get; init; }

    /// <summary>What is computed.</summary>
    public required MeasureKind Kind { get; init; }

    /// <summary>The condition or object that is measured; for <c>average</c> either.</summary>
    public required ExpressionSyntax Subject { get; init; }

    /// <summary>The condition behind <c>while</c> in a subject in brackets: <c>(EXPR while COND)</c>.</summary>
    public required ExpressionSyntax? While { get; init; }

    /// <summary>The share behind <c>quantile</c>.</summary>
    public required ExpressionSyntax? Share { get; init; }

    /// <summary>How the measure relates to time.</summary>
    public required MeasureScope Scope { get; init; }

    /// <summary>The times behind <c>at</c> or <c>over</c>, in order; empty otherwise.</summary>
    public required IReadOnlyList<TimeTermSyntax> Times { get; init; }

    /// <summary>The condition behind <c>until</c>.</summary>
    public required ExpressionSyntax? Until { get; init; }
}

/// <summary>The measures of the notation.</summary>
public enum MeasureKind
{
    /// <summary><c>probability COND</c>.</summary>
    Probability,

    /// <summary><c>expected OBJECT</c>.</summary>
    Expected,

    /// <summary><c>average COND_OR_OBJECT</c>.</summary>
    Average,

    /// <summary><c>total OBJECT</c>.</summary>
    Total,

    /// <summary><c>reliability COND</c>.</summary>
    Reliability,

    /// <summary><c>onset COND</c>.</summary>
    Onset,

    /// <summary><c>entries COND</c>.</summary>
    Entries,

    /// <summary><c>mean time to COND</c>.</summary>
    MeanTime,

    /// <summary><c>deviation time to COND</c>.</summary>
    DeviationTime,

    /// <summary><c>quantile Q time to COND</c>.</summary>
    QuantileTime,

    /// <summary><c>mean spell COND</c>.</summary>
    MeanSpell,
}

/// <summary>How a measure relates to time.</summary>
public enum MeasureScope
{
    /// <summary>The measure has no times: <c>mean time to …</c>.</summary>
    None,

    /// <summary><c>at TIMES</c>.</summary>
    At,

    /// <summary><c>over TIMES</c>.</summary>
    Over,

    /// <summary><c>steady</c>.</summary>
    Steady,

    /// <summary><c>until COND</c>.</summary>
    Until,
}

/// <summary>One comma-separated part of TIMES.</summary>
public abstract record TimeTermSyntax : SyntaxNode;

/// <summary>A single time.</summary>
public sealed record SingleTimeSyntax : TimeTermSyntax
{
    /// <summary>The time.</summary>
    public required ExpressionSyntax Time { get; init; }
}

/// <summary><c>LO .. HI step D</c>.</summary>
public sealed record StepTimesSyntax : TimeTermSyntax
{
    /// <summary>Both ends.</summary>
    public required RangeSyntax Range { get; init; }

    /// <summary>The distance between neighbours.</summary>
    public required ExpressionSyntax Step { get; init; }
}

/// <summary><c>LO .. HI log N</c>.</summary>
public sealed record LogTimesSyntax : TimeTermSyntax
{
    /// <summary>Both ends.</summary>
    public required RangeSyntax Range { get; init; }

    /// <summary>The number of points, ends included.</summary>
    public required ExpressionSyntax Points { get; init; }
}
