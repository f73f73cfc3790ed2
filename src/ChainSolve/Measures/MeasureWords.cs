using ChainSolve.Language.Syntax;

namespace ChainSolve.Measures;

/// <summary>The kinds of measures in the words of the notation.</summary>
internal static class MeasureWords
{
    public static string Of(MeasureKind kind) => kind switch
    {
        MeasureKind.Probability => "probability",
        MeasureKind.Expected => "expected",
        MeasureKind.Average => "average",
        MeasureKind.Total => "total",
        MeasureKind.Reliability => "reliability",
        MeasureKind.Onset => "onset",
        MeasureKind.Entries => "entries",
        MeasureKind.MeanTime => "mean time",
        MeasureKind.DeviationTime => "deviation time",
        MeasureKind.QuantileTime => "quantile time",
        MeasureKind.MeanSpell => "mean spell",
        _ => throw new ArgumentOutOfRangeException(nameof(kind), kind, "Unknown kind of measure."),
    };
}
