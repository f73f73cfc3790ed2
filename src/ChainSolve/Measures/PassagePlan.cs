namespace ChainSolve.Measures;

/// <summary>A measure of the time until a condition is met, or of what is earned until then.</summary>
internal sealed record PassagePlan
{
    public required MeasureAsk Ask { get; init; }

    /// <summary>The states in which the condition does not hold.</summary>
    public required bool[] Alive { get; init; }

    /// <summary>What is earned per unit of time, not negative; null where the time itself is asked.</summary>
    public double[]? Gain { get; init; }

    /// <summary>What is lost per unit of time, not negative; null for nothing.</summary>
    public double[]? Loss { get; init; }
}
