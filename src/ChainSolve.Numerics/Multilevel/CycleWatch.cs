using ChainSolve.Numerics.Operators;

namespace ChainSolve.Numerics.Multilevel;

/// <summary>Judges how far cycles have come, by how much the weights still change and how fast that shrinks.</summary>
/// <remarks>
/// Weights that change little may still be far off in a direction that shrinks slowly. So at the end they are
/// disturbed on every level, groups as wholes too, and what is left of that after some cycles shows the speed
/// of every direction, whether or not the weights had an error in it. Not safe to share between threads.
/// </remarks>
internal sealed class CycleWatch
{
    // Weights below it have no digits that could be judged.
    private const double Negligible = 1e-280;

    // Below it a change may stand still because of rounding.
    private const double Rough = 1e-11;

    // Changes as large as this are too wild to be combined.
    private const double Calm = 0.5;
    private const int ProbeCycles = 6;

    // Balances that are off by more are not met.
    private const double Unbalanced = 1e-12;

    // A disturbance that has shrunk to this has faded in every direction.
    private const double Faded = 1e-3;
    private const double Unit = 1.12e-16;
    private const int Standstill = 3;

    private readonly double[] reference;
    private readonly double rounding;
    private readonly bool combines;
    private readonly Recombination? recombination;
    private readonly Queue<double> ratios = new();
    private double lowest = double.PositiveInfinity;
    private int still;

    /// <param name="generator">The chain.</param>
    /// <param name="combines">Whether results of cycles are combined with earlier ones.</param>
    public CycleWatch(Generator generator, bool combines = true)
    {
        this.combines = combines;
        recombination = combines ? new Recombination() : null;
        reference = new double[generator.StateCount];
        rounding = Unit * (8 + (generator.TransitionCount / (double)generator.StateCount));
    }

    /// <summary>The largest relative change of a weight in the last cycle, apart from a change that all have in common.</summary>
    public double Change { get; private set; } = double.PositiveInfinity;

    /// <summary>How much of an error is left after a cycle, at worst of what was seen lately.</summary>
    public double Contraction => ratios.Count == 0 ? 1 : ratios.Max();

    public int Cycles { get; private set; }

    public bool IsDone { get; private set; }

    /// <summary>How far the balance of a state was off at the end, relative.</summary>
    public double Imbalance { get; private set; }

    /// <summary>Whether the last cycle stood still where the balances do not hold.</summary>
    public bool IsUndone { get; private set; }

    /// <summary>By how much the roundings of one cycle are magnified in its result; 1 where nothing is subtracted.</summary>
    public double Amplification { get; set; } = 1;

    /// <summary>The relative error that is left, for the worst weight.</summary>
    public double Error => Contraction >= 1
        ? double.PositiveInfinity
        : 8 * ((Change * (combines ? Contraction : 1)) + Imbalance + (rounding * Amplification)) / (1 - Contraction);

    /// <summary>Runs a cycle, looks at its change, and combines the result with earlier ones.</summary>
    public void Step(FlowLevel finest, Action cycle)
    {
        if (Change >= Calm)
        {
            recombination?.Restart();
        }

        finest.Weights.CopyTo(reference, 0);
        cycle();
        Cycles++;
        var next = Spread(finest.Weights);
        Note(next / Change);

        still = next > 0.9 * lowest ? still + 1 : 0;
        (Change, lowest) = (next, Math.Min(lowest, next));
        IsDone = next <= rounding || (next < Rough && still >= Standstill);
        if (IsDone)
        {
            // A cycle may stand still at wrong weights, where the sweeps and the corrections undo each other.
            Imbalance = finest.Imbalance();
            IsUndone = Imbalance > Unbalanced;
            IsDone = !IsUndone;
        }

        if (!IsDone && next < Calm)
        {
            recombination?.Improve(reference, finest.Weights);
        }
    }

    /// <summary>Disturbs the weights and sees how fast plain cycles make that fade; the weights are put back afterwards.</summary>
    public void Probe(FlowLevel finest, Action disturb, Action cycle, int mostCycles)
    {
        finest.Weights.CopyTo(reference, 0);
        disturb();
        ratios.Clear();
        var first = Spread(finest.Weights);
        var before = first;
        var c = 0;
        while (c < mostCycles && before > 1e-4 * first && !(c >= ProbeCycles && IsSteady))
        {
            cycle();
            c++;
            var after = Spread(finest.Weights);
            Note(after / before);
            before = after;
        }

        Cycles += c;
        if (Contraction >= 1 && before < Faded * first)
        {
            // Errors that turn as they shrink have no steady speed; what they lost on the way is their speed. One that stands
            // still after others have faded is another matter: it leaves the contraction at 1.
            ratios.Clear();
            ratios.Enqueue(Math.Pow(before / first, 1.0 / c));
        }

        reference.CopyTo(finest.Weights, 0);
    }

    /// <summary>Whether the last ratios are alike: then only the slowest direction is left.</summary>
    private bool IsSteady => ratios.Max() < 1 && (1 - ratios.Max()) > 0.9 * (1 - ratios.Min());

    private void Note(double ratio)
    {
        ratios.Enqueue(ratio);
        if (ratios.Count > 3)
        {
            ratios.Dequeue();
        }
    }

    /// <summary>The range of the quotients of the weights by the reference, relative.</summary>
    private double Spread(double[] weights)
    {
        var (low, high) = (double.PositiveInfinity, 0.0);
        for (var i = 0; i < weights.Length; i++)
        {
            if (reference[i] > Negligible && weights[i] > Negligible)
            {
                var quotient = weights[i] / reference[i];
                low = Math.Min(low, quotient);
                high = Math.Max(high, quotient);
            }
        }

        return high > 0 ? (high / low) - 1 : 0;
    }
}
