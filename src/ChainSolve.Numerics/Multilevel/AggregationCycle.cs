using ChainSolve.Numerics.Elimination;
using ChainSolve.Numerics.Operators;

namespace ChainSolve.Numerics.Multilevel;

/// <summary>
/// Cycles that smooth the weights of a chain on ever coarser levels (Horton and Leutenegger 1994; groups by strength of flow
/// after De Sterck and others 2008; both from memory). The coarsest level is eliminated without subtractions.
/// </summary>
/// <remarks>Not safe to share between threads.</remarks>
internal sealed class AggregationCycle
{
    private const int CoarsestCount = 40;

    private readonly FlowLevel finest;
    private readonly int smoothings;
    private readonly List<Coarsening> steps = [];

    /// <summary>Sets up the levels; the groups follow the flows at the weights that <paramref name="finest"/> has now.</summary>
    /// <param name="finest">The chain itself.</param>
    /// <param name="smoothings">Sweeps before and after each correction; more make the cycle safer on chains that mostly turn one way.</param>
    /// <param name="cancellation">Looked at often.</param>
    public AggregationCycle(FlowLevel finest, int smoothings, CancellationToken cancellation)
    {
        (this.finest, this.smoothings) = (finest, smoothings);
        var level = finest;
        while (level.Count > CoarsestCount)
        {
            var (groupOf, count) = FlowGroups.Of(level, cancellation);
            if (count > 0.9 * level.Count)
            {
                break;
            }

            var step = Coarsening.Of(level, groupOf, count, cancellation);
            step.Restrict(cancellation);
            steps.Add(step);
            level = step.Coarse;
        }
    }

    public int LevelCount => steps.Count + 1;

    /// <summary>One cycle down to the coarsest level and back.</summary>
    public void Run(CancellationToken cancellation) => Run(0, cancellation);

    private void Run(int k, CancellationToken cancellation)
    {
        var level = k == 0 ? finest : steps[k - 1].Coarse;
        if (k == steps.Count)
        {
            Coarsest(level, cancellation);
            return;
        }

        // Coarse levels are cheap, and a second visit there is worth more than one on the finest.
        for (var visit = 0; visit < (k == 0 ? 1 : 2); visit++)
        {
            Smooth(level, false, cancellation);
            steps[k].Restrict(cancellation);
            Run(k + 1, cancellation);
            steps[k].Correct();
            Smooth(level, true, cancellation);
        }
    }

    private void Smooth(FlowLevel level, bool isDown, CancellationToken cancellation)
    {
        for (var s = 0; s < smoothings; s++)
        {
            level.Sweep(isDown ^ (s % 2 == 1), cancellation);
        }
    }

    /// <summary>Disturbs the weights on every level, by up to half each.</summary>
    public void Disturb()
    {
        var noise = new double[steps.Count == 0 ? finest.Count : steps[^1].Coarse.Count];
        Array.Fill(noise, 1);
        for (var k = steps.Count; k >= 0; k--)
        {
            if (k < steps.Count)
            {
                var finer = new double[k == 0 ? finest.Count : steps[k - 1].Coarse.Count];
                Array.Fill(finer, 1);
                steps[k].Spread(noise, finer);
                noise = finer;
            }

            for (var i = 0; i < noise.Length; i++)
            {
                var mixed = ((uint)i + 12345u + ((uint)k << 20)) * 2654435761u;
                mixed = (mixed ^ (mixed >> 15)) * 2246822519u;
                noise[i] *= 0.75 + ((mixed >> 8) / (double)(1 << 25));
            }
        }

        for (var i = 0; i < noise.Length; i++)
        {
            finest.Weights[i] *= noise[i];
        }
    }

    private static void Coarsest(FlowLevel level, CancellationToken cancellation)
    {
        if (level.Count > CoarsestCount || Array.Exists(level.Outflows, f => f == 0))
        {
            level.Sweep(false, cancellation);
            level.Sweep(true, cancellation);
            return;
        }

        var builder = new GeneratorBuilder(level.Count);
        for (var j = 0; j < level.Count; j++)
        {
            for (var e = level.Inflows.Offsets[j]; e < level.Inflows.Offsets[j + 1]; e++)
            {
                builder.Add(level.Inflows.Targets[e], j, level.Inflows.Values[e]);
            }
        }

        var found = DenseElimination.Of(builder.Build(), null, cancellation).Stationary();
        var largest = found[0];
        foreach (var weight in found)
        {
            largest = (weight / largest).ToDouble() > 1 ? weight : largest;
        }

        for (var j = 0; j < found.Length; j++)
        {
            level.Weights[j] = (found[j] / largest).ToDouble();
        }
    }
}
