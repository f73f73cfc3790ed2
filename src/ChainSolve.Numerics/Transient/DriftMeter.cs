using ChainSolve.Numerics.Arithmetic;
using ChainSolve.Numerics.Kernels;
using ChainSolve.Numerics.Poisson;

namespace ChainSolve.Numerics.Transient;

/// <summary>Tells between which factors the elements of a vector changed in its last step, rounding counted. Reads the vectors; for one caller at a time.</summary>
internal sealed class DriftMeter(UniformizedStep step)
{
    /// <summary>How far a drift may be off as a double, relative.</summary>
    public const double Rounding = 1.3e-16;

    /// <summary>What the rounding of vectors may do to a drift: in two steps, twice over.</summary>
    public double Noise => (4 * step.StepError) + 1e-31;

    /// <summary>The drift of some states; without end where mass arrived for the first time, none where nothing is.</summary>
    public Drift Of(ReadOnlySpan<int> states)
    {
        var range = new Seen(step.Vectors);
        foreach (var i in states)
        {
            range.Include(i);
        }

        return range.With(Noise / 2);
    }

    /// <summary>The drift of the states that are marked.</summary>
    public Drift Of(bool[] among)
    {
        var range = new Seen(step.Vectors);
        for (var i = 0; i < among.Length; i++)
        {
            if (among[i])
            {
                range.Include(i);
            }
        }

        return range.With(Noise / 2);
    }

    private struct Seen(StepVectors vectors)
    {
        private double low = double.PositiveInfinity;
        private double high = double.NegativeInfinity;

        public void Include(int state)
        {
            var at = state + StepVectors.Lanes;
            var before = DoubleDouble.Of(vectors.To[at], vectors.ToLow[at]);
            var now = DoubleDouble.Of(vectors.From[at], vectors.FromLow[at]);
            if (before.High > 0 || now.High > 0)
            {
                var change = before.High == 0 ? double.PositiveInfinity : ((now - before) / before).High;
                (low, high) = (Math.Min(low, change), Math.Max(high, change));
            }
        }

        public readonly Drift With(double noise) => low > high
            ? new Drift(0, 0)
            : new Drift(low - Math.Abs(low * Rounding) - noise, high + Math.Abs(high * Rounding) + noise);
    }
}
