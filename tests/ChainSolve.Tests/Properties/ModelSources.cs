using ChainSolve.Tests.Shared.Chains;
using FsCheck;
using FsCheck.Fluent;

namespace ChainSolve.Tests.Properties;

/// <summary>Random models with replicas and a crew.</summary>
public static class ModelSketches
{
    public static Arbitrary<ModelSketch> Sketches()
    {
        var gen =
            from units in Gen.Choose(1, 4)
            from states in Gen.Choose(2, 3)
            from crew in Gen.Choose(1, 2)
            from seed in Gen.Choose(0, int.MaxValue - 1)
            select Make(units, states, crew, new Random(seed));
        return Arb.From(gen, sketch => sketch.Shrink());
    }

    private static ModelSketch Make(int units, int states, int crew, Random random)
    {
        // Every state leads on and some lead back; the last may be for good.
        var moves = new List<(int, int, double, bool)>();
        for (var from = 0; from < states; from++)
        {
            for (var to = 0; to < states; to++)
            {
                var isNext = to == from + 1;
                if (from != to && (isNext || random.Next(2) == 0))
                {
                    moves.Add((from, to, Math.Pow(10, -6 * random.NextDouble()), !isNext && random.Next(2) == 0));
                }
            }
        }

        return new ModelSketch
        {
            Units = units,
            States = states,
            Moves = moves,
            CrewSize = crew,
            Time = Math.Pow(10, (6 * random.NextDouble()) - 2),
        };
    }
}

/// <summary>Random chains of up to eight states, over short and long times.</summary>
public static class SmallChains
{
    public static Arbitrary<RandomChain> Chains() => RandomChains.Any(1e-6, 1e8, 8);
}
