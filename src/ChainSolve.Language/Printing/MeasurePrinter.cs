using ChainSolve.Language.Syntax;

namespace ChainSolve.Language.Printing;

/// <summary>Writes measures.</summary>
internal static class MeasurePrinter
{
    public static string Print(MeasureSyntax measure)
    {
        var subject = measure.While is null ? ExpressionPrinter.Print(measure.Subject) : $"({ExpressionPrinter.Print(measure.Subject)}{StatementPrinter.Behind("while", measure.While)})";
        return $"measure {measure.Name.Text} = {Form(measure)} {subject}{Scope(measure)}";
    }

    private static string Form(MeasureSyntax measure) => measure.Kind switch
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
        MeasureKind.QuantileTime => $"quantile {ExpressionPrinter.Print(measure.Share!)} time to",
        MeasureKind.MeanSpell => "mean spell",
        _ => throw new ArgumentException($"A measure of the kind {measure.Kind} has no printed form.", nameof(measure)),
    };

    private static string Scope(MeasureSyntax measure) => measure.Scope switch
    {
        MeasureScope.At => $" at {Times(measure.Times)}",
        MeasureScope.Over => $" over {Times(measure.Times)}",
        MeasureScope.Steady => " steady",
        MeasureScope.Until => StatementPrinter.Behind("until", measure.Until),
        _ => "",
    };

    private static string Times(IReadOnlyList<TimeTermSyntax> times) => string.Join(", ", times.Select(t => t switch
    {
        SingleTimeSyntax single => ExpressionPrinter.Print(single.Time),
        StepTimesSyntax step => $"{StatementPrinter.Interval(step.Range)} step {ExpressionPrinter.Print(step.Step)}",
        LogTimesSyntax log => $"{StatementPrinter.Interval(log.Range)} log {ExpressionPrinter.Print(log.Points)}",
        _ => throw new ArgumentException($"A time of the type {t.GetType().Name} has no printed form.", nameof(times)),
    }));
}
