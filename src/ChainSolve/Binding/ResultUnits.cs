using ChainSolve.Language.Syntax;
using ChainSolve.Modelling;

namespace ChainSolve.Binding;

/// <summary>The dimension and the unit of the values of a measure.</summary>
internal static class ResultUnits
{
    /// <param name="kind">The kind of measure.</param>
    /// <param name="scope">How it relates to time.</param>
    /// <param name="earning">The measured object; null where a condition is measured.</param>
    /// <param name="timeBase">The model's unit of time.</param>
    public static (int TimePower, string Unit) Of(MeasureKind kind, MeasureScope scope, Earning? earning, TimeBase timeBase)
    {
        if (earning is not null)
        {
            return OfObject(kind == MeasureKind.Total, earning, timeBase);
        }

        var power = (kind, scope) switch
        {
            (MeasureKind.Entries, MeasureScope.Over) => 0,
            (MeasureKind.Entries, _) => -1,
            (MeasureKind.MeanTime or MeasureKind.DeviationTime or MeasureKind.QuantileTime or MeasureKind.MeanSpell, _) => 1,
            _ => 0,
        };
        return (power, GivenText.BaseUnit(power, timeBase));
    }

    private static (int TimePower, string Unit) OfObject(bool isTotal, Earning earning, TimeBase timeBase)
    {
        var power = isTotal ? earning.TimePower + 1 : earning.TimePower;
        return earning.Unit switch
        {
            null => (power, GivenText.BaseUnit(power, timeBase)),
            { } label when isTotal => (power, label),
            { } label => (power, $"{label} per {(timeBase.IsUnitless ? "unit of time" : timeBase.Unit)}"),
        };
    }
}
