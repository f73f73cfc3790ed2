using ChainSolve.Language.Syntax;

namespace ChainSolve.Binding;

/// <summary>What each kind of measure measures, and when.</summary>
internal static class MeasureForms
{
    /// <summary>The kind as written.</summary>
    public static string Words(MeasureKind kind) => kind switch
    {
        MeasureKind.Probability => "probability",
        MeasureKind.Expected => "expected",
        MeasureKind.Average => "average",
        MeasureKind.Total => "total",
        MeasureKind.Reliability => "reliability",
        MeasureKind.Onset => "onset",
        MeasureKind.Entries => "entries",
        MeasureKind.MeanTime => "mean time to",
        MeasureKind.DeviationTime => "deviation time to",
        MeasureKind.QuantileTime => "quantile time to",
        MeasureKind.MeanSpell => "mean spell",
        _ => throw new ArgumentOutOfRangeException(nameof(kind), kind, "Unknown kind of measure."),
    };

    public static IReadOnlyList<MeasureScope> Scopes(MeasureKind kind) => kind switch
    {
        MeasureKind.Probability or MeasureKind.Expected => [MeasureScope.At, MeasureScope.Steady],
        MeasureKind.Average => [MeasureScope.Over, MeasureScope.Steady],
        MeasureKind.Total => [MeasureScope.Over, MeasureScope.Until],
        MeasureKind.Reliability or MeasureKind.Onset => [MeasureScope.Over],
        MeasureKind.Entries => [MeasureScope.At, MeasureScope.Over, MeasureScope.Steady],
        MeasureKind.MeanSpell => [MeasureScope.Steady],
        _ => [MeasureScope.None],
    };

    /// <summary>The scopes of a kind in words: <c>with 'at TIMES' or 'steady'</c>.</summary>
    public static string Describe(MeasureKind kind)
    {
        var words = Scopes(kind).Select(scope => scope switch
        {
            MeasureScope.At => "'at TIMES'",
            MeasureScope.Over => "'over TIMES'",
            MeasureScope.Until => "'until COND'",
            MeasureScope.Steady => "'steady'",
            _ => "",
        }).ToList();
        return words is [""] ? "without times" : $"with {string.Join(" or ", words)}";
    }

    public static bool TakesCondition(MeasureKind kind) => kind is not (MeasureKind.Expected or MeasureKind.Total);

    public static bool TakesObject(MeasureKind kind) => kind is MeasureKind.Expected or MeasureKind.Total or MeasureKind.Average;
}
