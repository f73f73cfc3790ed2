using ChainSolve.Modelling;

namespace ChainSolve.Binding;

/// <summary>Judges what of a model follows from the values of its givens: sizes of crews, counts, starts, ranges and draws.</summary>
internal static class ModelChecks
{
    /// <summary>What is wrong, at most one fault for each item, counter, crew and draw.</summary>
    public static IEnumerable<Fault> Check(
        IEnumerable<BoundItem> items,
        IEnumerable<BoundCounter> counters,
        IEnumerable<BoundCrew> crews,
        IEnumerable<BoundTransition> transitions,
        double[] givens)
    {
        var shapes = new ShapeChecks(givens);
        var draws = transitions.SelectMany(t => t.Effects).OfType<MoveEffect>();
        return items.Select(shapes.Check)
            .Concat(counters.Select(shapes.Check))
            .Concat(crews.Select(crew => GivenChecks.Check(crew, givens)))
            .Concat(draws.Select(shapes.Check))
            .OfType<Fault>();
    }
}
