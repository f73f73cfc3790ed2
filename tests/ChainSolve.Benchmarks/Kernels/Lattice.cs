using ChainSolve.Numerics.Operators;

namespace ChainSolve.Benchmarks.Kernels;

/// <summary>Five items of fifteen replicas each, that fail and are repaired: 1,048,576 states, 9,830,400 transitions.</summary>
internal static class Lattice
{
    private const int Levels = 16;

    private static readonly double[] Failures = [1e-3, 2e-3, 3e-3, 1.5e-3, 2.5e-3];
    private static readonly double[] Repairs = [0.01, 0.02, 0.015, 0.03, 0.025];

    public static Generator Make()
    {
        var count = (int)Math.Pow(Levels, Failures.Length);
        var offsets = new long[count + 1];
        var (targets, rates) = (new List<int>(), new List<double>());
        for (var state = 0; state < count; state++)
        {
            // Ascending targets: first what is repaired, from the slowest digit on, then what fails, from the fastest.
            for (var item = Failures.Length - 1; item >= 0; item--)
            {
                Add(state, item, -1);
            }

            for (var item = 0; item < Failures.Length; item++)
            {
                Add(state, item, 1);
            }

            offsets[state + 1] = targets.Count;
        }

        return Generator.FromRows(offsets, [.. targets], [.. rates]);

        void Add(int state, int item, int step)
        {
            var weight = 1 << (4 * item);
            var level = state / weight % Levels;
            var rate = step > 0 ? Failures[item] * (Levels - 1 - level) : Repairs[item] * level;
            if (rate > 0)
            {
                targets.Add(state + (step * weight));
                rates.Add(rate);
            }
        }
    }
}
