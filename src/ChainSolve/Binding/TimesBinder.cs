using ChainSolve.Language.Syntax;
using ChainSolve.Modelling;

namespace ChainSolve.Binding;

/// <summary>Binds the times of a measure.</summary>
internal sealed class TimesBinder(BindContext context, NameTable names, ExpressionBinder expressions)
{
    private const string Place = "a time of a measure";

    /// <summary>The parts in order; null after a fault.</summary>
    public IReadOnlyList<BoundTimes>? Bind(IReadOnlyList<TimeTermSyntax> terms)
    {
        var bound = terms.Select(BindTerm).ToList();
        return bound.Contains(null) ? null : [.. bound.OfType<BoundTimes>()];
    }

    /// <summary>The unit that all times end in; the time base where there is no such unit.</summary>
    public OutsideUnit UnitOf(IReadOnlyList<TimeTermSyntax> terms)
    {
        var ends = terms.SelectMany(Expressions).Where(e => e is not NumberSyntax { Value: 0 }).Select(UnitOf).Distinct().ToList();
        return ends is [{ } shared] ? shared : new OutsideUnit(context.TimeBase.Unit, 1);
    }

    private OutsideUnit? UnitOf(ExpressionSyntax time) =>
        time is NameSyntax name && names.Find(name.Name.Text) is GivenSymbol given
            ? given.OutsideUnit
            : EndingUnit.Of(time, Dimension.Time, context.TimeBase);

    private static IEnumerable<ExpressionSyntax> Expressions(TimeTermSyntax term) => term switch
    {
        SingleTimeSyntax single => [single.Time],
        StepTimesSyntax step => [step.Range.Low, step.Range.High, step.Step],
        LogTimesSyntax log => [log.Range.Low, log.Range.High],
        _ => [],
    };

    private BoundTimes? BindTerm(TimeTermSyntax term)
    {
        switch (term)
        {
            case SingleTimeSyntax single:
                return Time(single.Time) is { } time ? new SingleTime { Time = time.Expr, Span = term.Span } : null;
            case StepTimesSyntax steps:
                var (first, last, step) = (Time(steps.Range.Low), Time(steps.Range.High), Time(steps.Step));
                return first is null || last is null || step is null
                    ? null
                    : new StepTimes { From = first.Expr, To = last.Expr, Step = step.Expr, Span = term.Span };
            case LogTimesSyntax logs:
                var (low, high) = (Time(logs.Range.Low), Time(logs.Range.High));
                var points = expressions.BindQuantity(logs.Points, Scope, Dimension.Plain, "the number of times behind 'log'");
                return low is null || high is null || points is null
                    ? null
                    : new LogTimes { From = low.Expr, To = high.Expr, Points = points.Expr, Span = term.Span };
            default:
                throw new ArgumentException($"Unknown times {term.GetType().Name}.", nameof(term));
        }
    }

    private static ExprScope Scope => ExprScope.Fixed(Place);

    private Quantity? Time(ExpressionSyntax syntax) => expressions.BindQuantity(syntax, Scope, Dimension.Time, Place);
}
