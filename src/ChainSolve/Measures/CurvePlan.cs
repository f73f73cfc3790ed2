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

    /// <summary>The times of all plans, ascending, each once.</summary>
    public static double[] Times(IReadOnlyList<CurvePlan> plans)
    {
        var times = new double[plans.Sum(p => p.Ask.Times.Count)];
        var filled = 0;
        foreach (var plan in plans)
        {
            foreach (var time in plan.Ask.Times)
            {
                times[filled++] = time;
            }
        }

        Array.Sort(times);
        var kept = 0;
        foreach (var time in times)
        {
            if (kept == 0 || time != times[kept - 1])
            {
                times[kept++] = time;
            }
        }

        return times[..kept];
    }
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
