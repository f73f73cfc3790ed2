using ChainSolve.Numerics.Poisson;

namespace ChainSolve.Numerics.Transient;

/// <summary>
/// Mass that is followed through a chain: that of the start, or what blocks that have settled feed into the rest of the chain at every step from some step on,
/// of which the first portion is followed.
/// </summary>
/// <param name="FirstStep">The step after which the mass is there.</param>
/// <param name="Drifts">How the amount changes from portion to portion, one entry for each stage before this one; empty for the start.</param>
/// <param name="Open">The times that it still matters to.</param>
/// <param name="Weights">What it counts for, by time; empty for the start.</param>
/// <param name="IsCleared">By block: whether it was cleared or cut off, and holds nothing.</param>
internal sealed record Flow(
    long FirstStep, IReadOnlyList<Drift> Drifts, IReadOnlyList<TimeSums> Open, IReadOnlyList<SettledWeights> Weights, bool[] IsCleared)
{
    /// <summary>The first portion: high and low parts of what each state gets; null for the start.</summary>
    public (double[] High, double[] Low)? Portion { get; init; }

    /// <summary>The last step that matters.</summary>
    public double Horizon => Open.Where(s => !IsStart || !s.IsDone).Select(s => s.Horizon).DefaultIfEmpty(0).Max();

    /// <summary>At most how many portions there are, as seen from any time.</summary>
    public double Portions => Drifts.Aggregate(1.0, (n, d) => n * Math.Min(Horizon, d.High < 0 ? 1 / -d.High : double.PositiveInfinity));

    /// <summary>The first block that still holds something; the number of blocks where none does.</summary>
    public int FirstBlock => Array.IndexOf(IsCleared, false) is var first && first < 0 ? IsCleared.Length : first;

    /// <summary>How many blocks still hold something.</summary>
    public int BlocksLeft => IsCleared.Count(c => !c);

    private bool IsStart => Portion is null;

    /// <summary>Adds what the vector earns after some steps to every time.</summary>
    /// <param name="steps">How many steps were taken.</param>
    /// <param name="step">The vector.</param>
    /// <param name="earned">Gives its products with the rewards.</param>
    public void Add(long steps, UniformizedStep step, Func<double[]> earned)
    {
        if (IsStart)
        {
            foreach (var sum in Open)
            {
                if (!sum.IsDone)
                {
                    sum.Add(steps);
                }
            }

            return;
        }

        var products = earned();
        for (var s = 0; s < Open.Count; s++)
        {
            Open[s].AddSettled(Weights[s].After(steps), products, step.Vector);
        }
    }
}
