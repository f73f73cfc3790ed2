using ChainSolve.Expressions;
using ChainSolve.Modelling;

namespace ChainSolve.Binding;

/// <summary>Judges a model with the values that its givens have of themselves.</summary>
internal sealed class DefaultValues(BindContext context, NameTable names, BoundModel model)
{
    private readonly double[] values = GivenEvaluator.Evaluate(model.Givens, new double?[model.Givens.Count]);

    public void Check()
    {
        for (var i = 0; i < values.Length; i++)
        {
            Report(GivenChecks.Check(model.Givens[i], values, values[i], context.TimeBase));
        }

        foreach (var fault in ModelChecks.Check(model.Items, model.Counters, model.Crews, model.Transitions, values))
        {
            Report(fault);
        }

        foreach (var measure in model.Measures)
        {
            Check(measure);
        }

        WarnOfWaiting();
    }

    private void Check(BoundMeasure measure)
    {
        if (measure.Share is { } share && !(GivenEvaluator.ValueOf(share, values) is > 0 and < 1))
        {
            Report(BindingFaults.ShareOutOfRange(measure.Span, GivenEvaluator.ValueOf(share, values)));
        }

        Report(new TimesResolver(context.TimeBase, values, measure.Times).Faults is [var first, ..] ? first : null);
    }

    private void Report(Fault? fault)
    {
        if (fault is not null)
        {
            context.Sink.Enter(fault);
            context.Report(fault);
        }
    }

    // Every job of a crew is memoryless so far: its rate scaled by the share served. IEC 61165 warns of just that (from memory).
    private void WarnOfWaiting()
    {
        var served = names.All.OfType<ItemSymbol>()
            .SelectMany(i => i.Moves)
            .Where(m => m.Crew is not null && !IsNever(m))
            .GroupBy(m => m.Crew!, m => m.Item);
        foreach (var crew in served)
        {
            var size = GivenEvaluator.ValueOf(crew.Key.Count!.Expr, values);
            var jobs = crew.Distinct().Sum(i => GivenEvaluator.ValueOf(i.Count!.Expr, values));
            if (jobs > size)
            {
                context.Sink.Warn(BindingFaults.SharedRepair(crew.Key.Name, jobs, size));
            }
        }
    }

    private static bool IsNever(MoveDraft move) => move.Rate.Expr is ConstantExpr { Value: 0 } || move.When?.Expr is TruthExpr { Value: false };
}
