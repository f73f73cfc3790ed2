using ChainSolve.Expressions;
using ChainSolve.Modelling;

namespace ChainSolve.Binding;

/// <summary>Finds the givens that shape the states: those that counts, ranges and starts depend on, also by way of other givens.</summary>
internal static class StateShape
{
    public static IReadOnlyList<BoundGiven> Mark(
        IReadOnlyList<BoundGiven> givens, IReadOnlyList<BoundItem> items, IReadOnlyList<BoundCounter> counters)
    {
        var shapes = items.SelectMany(i => i.Start.Append(i.Count))
            .Concat(counters.SelectMany(c => new Expr[] { c.Low, c.High, c.Start }));
        var shaping = new HashSet<int>(ExprReads.Of(shapes).Givens);

        // A given follows only those above it, so one pass from below is enough.
        for (var i = givens.Count - 1; i >= 0; i--)
        {
            if (shaping.Contains(i))
            {
                shaping.UnionWith(ExprReads.Of([givens[i].Default]).Givens);
            }
        }

        return [.. givens.Select((given, i) => given with { ShapesStates = shaping.Contains(i) })];
    }
}
