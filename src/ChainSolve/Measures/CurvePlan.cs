using ChainSolve.Numerics.Estimates;

namespace ChainSolve.Measures;

/// <summary>A measure at times, as sums of values that a transient pass gives.</summary>
internal sealed record CurvePlan
{
    public required MeasureAsk Ask { get; init; }

    public required CurveForm Form { get; init; }

    /// <summary>The states that count, null for all; the chain is taken out of the others.</summary>
    public required bool[]? Alive { get; init; }

    /// <summary>What is added up, not negative.</summary>
    public required double[] Gain { get; init; }

    /// <summary>What is taken off, not negative; null for nothing.</summary>
    public double[]? Loss { get; init; }

    /// <summary>What is there from the start.</summary>
    public Estimate Offset { get; init; } = Estimate.Zero;

    /// <summary>The relative error of the entries of <see cref="Gain"/>.</summary>
    public double GainRounding { get; init; }
}

/// <summary>What is read from a transient pass.</summary>
internal enum CurveForm
{
    /// <summary>The expected value at a time.</summary>
    Rate,

    /// <summary>The sum from 0 to a time.</summary>
    Total,

    /// <summary>That sum over the time; at 0 the expected value.</summary>
    Average,
}
