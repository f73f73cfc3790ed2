using ChainSolve.Modelling;

namespace ChainSolve.Binding;

/// <summary>Judges the values of givens and what follows from them.</summary>
internal static class GivenChecks
{
    // As for every whole number of the notation.
    private const double WholeSlack = 1e-9;

    /// <summary>What is wrong with a given's value, its range and its distribution; null where nothing is.</summary>
    public static Fault? Check(BoundGiven given, double[] values, double value, TimeBase timeBase)
    {
        if (!double.IsFinite(value))
        {
            return BindingFaults.NotFinite(given.Span, given.Name, value);
        }

        if (given.Range is { } range)
        {
            var low = GivenEvaluator.ValueOf(range.Low, values);
            var high = GivenEvaluator.ValueOf(range.High, values);
            var (from, to) = (GivenText.Show(low, given, timeBase), GivenText.Show(high, given, timeBase));
            if (!(low <= high))
            {
                return BindingFaults.RangeBackwards(given.Span, from, to);
            }

            if (value < low || value > high)
            {
                return BindingFaults.OutOfRange(given.Span, given.Name, GivenText.Show(value, given, timeBase), from, to);
            }
        }

        return given.Spread is { } spread ? SpreadRules.Check(spread, given.Span, values) : null;
    }

    /// <summary>What is wrong with the size of a crew; null where nothing is.</summary>
    public static Fault? Check(BoundCrew crew, double[] values)
    {
        var size = GivenEvaluator.ValueOf(crew.Count, values);
        return size >= -WholeSlack && double.IsFinite(size) && Math.Abs(size - Math.Round(size)) <= WholeSlack
            ? null
            : BindingFaults.CrewNotWhole(crew.Span, crew.Name, size);
    }
}
