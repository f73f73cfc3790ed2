using ChainSolve.Numerics.Operators;
using ChainSolve.Tests.Shared.Chains;
using ChainSolve.Tests.Shared.Checks;
using ChainSolve.Tests.Shared.Reference;

namespace ChainSolve.Numerics.Tests.Support;

/// <summary>Generators for tests.</summary>
internal static class Chains
{
    public static Generator Of(int count, params (int From, int To, double Rate)[] moves)
    {
        var builder = new GeneratorBuilder(count);
        foreach (var (from, to, rate) in moves)
        {
            builder.Add(from, to, rate);
        }

        return builder.Build();
    }

    public static Generator Of(RandomChain chain) => Of(chain.Count, [.. chain.Moves]);

    public static Generator Of(ConcreteChain chain) => Of(chain.Count, [.. chain.Moves]);

    public static Generator BirthDeath(double[] births, double[] deaths)
    {
        var builder = new GeneratorBuilder(births.Length + 1);
        for (var i = 0; i < births.Length; i++)
        {
            builder.Add(i, i + 1, births[i]).Add(i + 1, i, deaths[i]);
        }

        return builder.Build();
    }

    /// <summary>A grid of the given sides on which every axis is a birth-death chain of its own; the first axis varies fastest.</summary>
    public static Generator Lattice(int[] sides, Func<int, int, double> up, Func<int, int, double> down)
    {
        var count = sides.Aggregate(1, (p, s) => p * s);
        var offsets = new long[count + 1];
        var (targets, rates) = (new List<int>(), new List<double>());
        var entries = new List<(int To, double Rate)>();
        for (var state = 0; state < count; state++)
        {
            entries.Clear();
            var stride = 1;
            for (var axis = 0; axis < sides.Length; stride *= sides[axis], axis++)
            {
                var level = state / stride % sides[axis];
                if (level > 0)
                {
                    entries.Add((state - stride, down(axis, level)));
                }

                if (level < sides[axis] - 1)
                {
                    entries.Add((state + stride, up(axis, level)));
                }
            }

            foreach (var (to, rate) in entries.OrderBy(e => e.To))
            {
                targets.Add(to);
                rates.Add(rate);
            }

            offsets[state + 1] = targets.Count;
        }

        return Generator.FromRows(offsets, [.. targets], [.. rates]);
    }

    public static double[] StartAt(int count, int state)
    {
        var start = new double[count];
        start[state] = 1;
        return start;
    }

    /// <summary>Relative distance; 0 for two zeros.</summary>
    public static double Distance(double value, BigFloat expected) => expected.IsZero
        ? (value == 0 ? 0 : double.PositiveInfinity)
        : ((value - expected) / expected).Abs.ToDouble();

    public static double Distance(double value, double expected) => expected == value ? 0 : Math.Abs(value - expected) / Math.Abs(expected);
}
