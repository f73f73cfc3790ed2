namespace ChainSolve.Measures;

/// <summary>A measure of the long run.</summary>
internal sealed record SteadyPlan
{
    public required MeasureAsk Ask { get; init; }

    /// <summary>What is earned per unit of time, not negative.</summary>
    public required double[] Gain { get; init; }

    /// <summary>What is lost per unit of time, not negative; null for nothing.</summary>
    public double[]? Loss { get; init; }

    /// <summary>What the earnings are divided by, for a mean spell: the rate at which the condition ends; null for no division.</summary>
    public double[]? Leaving { get; init; }

    /// <summary>The relative error of the entries of <see cref="Gain"/>.</summary>
    public double GainRounding { get; init; }
}
