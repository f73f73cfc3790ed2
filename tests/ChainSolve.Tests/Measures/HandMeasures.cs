using ChainSolve.Expressions;
using ChainSolve.Language.Syntax;
using ChainSolve.Language.Text;
using ChainSolve.Measures;
using ChainSolve.Modelling;

namespace ChainSolve.Tests.Measures;

/// <summary>Measures of chains that are written down by hand.</summary>
internal static class HandMeasures
{
    public static MeasureAsk At(MeasureKind kind, ConditionExpr condition, params double[] times) => Ask(kind, MeasureScope.At, condition, null, times);

    public static MeasureAsk At(MeasureKind kind, Earning earned, params double[] times) => Ask(kind, MeasureScope.At, null, earned, times);

    public static MeasureAsk Over(MeasureKind kind, ConditionExpr condition, params double[] times) => Ask(kind, MeasureScope.Over, condition, null, times);

    public static MeasureAsk Over(MeasureKind kind, Earning earned, params double[] times) => Ask(kind, MeasureScope.Over, null, earned, times);

    public static MeasureAsk Steady(MeasureKind kind, ConditionExpr condition) => Ask(kind, MeasureScope.Steady, condition, null, []);

    public static MeasureAsk Steady(MeasureKind kind, Earning earned) => Ask(kind, MeasureScope.Steady, null, earned, []);

    public static MeasureAsk TimeTo(MeasureKind kind, ConditionExpr condition, double share = 0) => Ask(kind, MeasureScope.None, condition, null, [], share);

    public static MeasureAsk TotalUntil(Earning earned, ConditionExpr until) => Ask(MeasureKind.Total, MeasureScope.Until, null, earned, [], until: until);

    /// <summary>Solves one measure.</summary>
    public static MeasureResult Solve(this HandChain chain, MeasureAsk ask, SolveOptions? options = null) => chain.SolveAll(options, ask)[0].Result;

    /// <summary>Solves measures together.</summary>
    public static IReadOnlyList<JudgedMeasure> SolveAll(this HandChain chain, SolveOptions? options, params MeasureAsk[] asks)
    {
        var context = new MeasureContext(chain, options ?? SolveOptions.Default, CancellationToken.None);
        return MeasurePlan.Of(asks, context).Run(context);
    }

    private static MeasureAsk Ask(
        MeasureKind kind, MeasureScope scope, ConditionExpr? condition, Earning? earned, double[] times, double share = 0, ConditionExpr? until = null)
    {
        var measure = new BoundMeasure
        {
            Name = "asked",
            Kind = kind,
            Scope = scope,
            Condition = condition,
            Object = earned,
            Share = null,
            Times = [],
            TimesUnit = new OutsideUnit("h", 1),
            Until = until,
            TimePower = 0,
            Unit = "",
            Sentence = "by hand",
            Span = new TextSpan(8, 5),
        };
        return new MeasureAsk(measure, times, share);
    }
}
