using ChainSolve.Binding;
using ChainSolve.Language.Diagnostics;
using ChainSolve.Language.Syntax;
using ChainSolve.Modelling;

namespace ChainSolve.Measures;

/// <summary>Works out what givens decide of measures: their times and shares.</summary>
internal static class MeasureAsks
{
    /// <exception cref="ModelFaultsException">Times or shares are not what they must be; all faults at once.</exception>
    public static IReadOnlyList<MeasureAsk> Of(BoundModel model, IReadOnlyList<BoundMeasure> measures, GivenValues givens)
    {
        var faults = new List<Diagnostic>();
        var asks = new List<MeasureAsk>();
        foreach (var measure in measures)
        {
            var times = Times(model, measure, givens, faults);
            var share = measure.Kind == MeasureKind.QuantileTime ? Share(model, measure, givens, faults) : 0;
            asks.Add(new MeasureAsk(measure, times, share));
        }

        return faults.Count == 0 ? asks : throw new ModelFaultsException(faults);
    }

    private static IReadOnlyList<double> Times(BoundModel model, BoundMeasure measure, GivenValues givens, List<Diagnostic> faults)
    {
        var resolved = TimesResolver.Resolve(model, measure.Times, givens);
        faults.AddRange(resolved.Faults);
        return resolved.Times ?? [];
    }

    private static double Share(BoundModel model, BoundMeasure measure, GivenValues givens, List<Diagnostic> faults)
    {
        var share = GivenEvaluator.ValueOf(measure.Share!, givens.AsSpan().ToArray());
        if (!(share > 0) || share > 1)
        {
            faults.Add(new Diagnostic(
                BindingCodes.ShareOutOfRange,
                Severity.Fault,
                FormattableString.Invariant($"the quantile of '{measure.Name}' is of the share {share:R}; a share is above 0 and at most 1"),
                measure.Span,
                model.Source));
        }

        return share;
    }
}
