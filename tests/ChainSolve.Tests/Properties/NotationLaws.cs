using ChainSolve.Tests.Checks;
using ChainSolve.Tests.Shared.Chains;

namespace ChainSolve.Tests.Properties;

/// <summary>What must not depend on how a model is written.</summary>
internal static class NotationLaws
{
    /// <summary>How far adding and splitting the same rates in another order moves an answer, relative.</summary>
    private const double Rounding = 1e-13;

    public static void ReplicasAreTheProduct(ModelSketch sketch) =>
        Same(SolvedText.Solve(sketch.AsReplicas()), SolvedText.Solve(sketch.AsSeparateItems()), Rounding, "separate items");

    public static void NamesAndOrderChangeNothing(ModelSketch sketch) =>
        Same(SolvedText.Solve(sketch.AsReplicas()), SolvedText.Solve(sketch.Renamed()), Rounding, "renamed");

    public static void ScaledTimeChangesNothing(ModelSketch sketch)
    {
        const double Factor = 64;
        var one = SolvedText.Solve(sketch.AsReplicas());
        var two = SolvedText.Solve(sketch.Slower(Factor).AsReplicas());

        // What is earned in time and what takes time grows with the factor, and no digit changes, since it is a power of two.
        foreach (var (name, values) in one.Values)
        {
            var factor = name is "c" or "g" ? Factor : 1;
            for (var k = 0; k < values.Count; k++)
            {
                Assert.True(values[k].Value * factor == two.Values[name][k].Value, $"{name}: {values[k]} and {two.Values[name][k]}");
            }
        }
    }

    public static void PrintedAndReadAgainIsTheSame(ModelSketch sketch)
    {
        var text = sketch.AsReplicas();
        var one = SolvedText.Solve(text);
        var two = SolvedText.Solve(SolvedText.Print(text));
        foreach (var (name, values) in one.Values)
        {
            Assert.Equal(values, two.Values[name]);
        }
    }

    public static void TruthIsWithinTheBounds(RandomChain chain)
    {
        var solved = SolvedText.Solve(MeasureTruths.Text(chain), MeasureTruths.MeanSpell);
        var faults = MeasureTruths.Faults(chain, solved).ToList();
        Assert.True(faults.Count == 0, string.Join('\n', faults));
    }

    private static void Same(SolvedText one, SolvedText two, double rounding, string what)
    {
        // Names sort alike in all ways of writing.
        foreach (var ((name, left), (_, right)) in one.Values.OrderBy(v => v.Key, StringComparer.Ordinal).Zip(two.Values.OrderBy(v => v.Key, StringComparer.Ordinal)))
        {
            for (var k = 0; k < left.Count; k++)
            {
                if (left[k].Value == right[k].Value)
                {
                    continue;
                }

                var slack = left[k].Bound + right[k].Bound + (rounding * Math.Abs(left[k].Value));
                Assert.True(Math.Abs(left[k].Value - right[k].Value) <= slack, $"{what}: {name}: {left[k]} and {right[k]}");
            }
        }
    }
}
