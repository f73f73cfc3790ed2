using ChainSolve.Language.Syntax;
using ChainSolve.Numerics.Estimates;

namespace ChainSolve.Measures;

/// <summary>Turns measures into plans and sorts them into groups. Not safe to share between threads.</summary>
internal sealed class MeasurePlanner(MeasureContext context)
{
    // Sums of times by rewards that never matter.
    private const double FewSums = 10_000;

    private readonly StateVectors vectors = new(context.Chain, context.Solve.Cancellation);
    private readonly List<CurvePlan> curves = [];
    private readonly List<SteadyPlan> steady = [];
    private readonly List<PassagePlan> passages = [];

    public IReadOnlyList<MeasureGroup> Groups()
    {
        // Masks are interned, so that alike ones are the same object.
        var all = new object();
        return
        [
            .. curves.GroupBy(p => (object?)p.Alive ?? all, ReferenceEqualityComparer.Instance).SelectMany(g => Passes([.. g])),
            .. steady.Count > 0 ? [new SteadyGroup(steady)] : Array.Empty<MeasureGroup>(),
            .. passages.GroupBy(p => p.Alive, ReferenceEqualityComparer.Instance).Select(g => new PassageGroup([.. g])),
        ];
    }

    public void Add(MeasureAsk ask)
    {
        switch (ask.Measure.Scope)
        {
            case MeasureScope.At or MeasureScope.Over:
                curves.Add(Curve(ask));
                break;
            case MeasureScope.Steady:
                steady.Add(Steady(ask));
                break;
            default:
                passages.Add(Passage(ask));
                break;
        }
    }

    /// <summary>One pass, unless it would spend far more on sums that nobody asked for than on the chain.</summary>
    private IEnumerable<CurveGroup> Passes(CurvePlan[] plans)
    {
        double times = CurvePlan.Times(plans).Length;
        double asked = plans.Sum(p => p.Ask.Times.Count);
        var sums = times * plans.Length;
        var step = context.Chain.Generator.TransitionCount + context.Chain.Generator.StateCount;
        return sums <= Math.Max(FewSums, 4 * Math.Max(asked, step))
            ? [new CurveGroup(plans)]
            : plans.GroupBy(p => string.Join(' ', p.Ask.Times.Order())).Select(g => new CurveGroup([.. g]));
    }

    private CurvePlan Curve(MeasureAsk ask)
    {
        var measure = ask.Measure;
        switch (measure.Kind)
        {
            case MeasureKind.Reliability:
                var kept = vectors.Holds(measure.Condition!);
                return new CurvePlan { Ask = ask, Form = CurveForm.Rate, Alive = kept, Gain = vectors.Ones(kept) };
            case MeasureKind.Onset:
                var target = vectors.Holds(measure.Condition!);
                return new CurvePlan
                {
                    Ask = ask,
                    Form = CurveForm.Total,
                    Alive = vectors.Not(target),
                    Gain = vectors.Entering(target),
                    GainRounding = MeasurePlan.SumRounding,
                    Offset = StartIn(target),
                };
            case MeasureKind.Entries:
                var entered = vectors.Entering(vectors.Holds(measure.Condition!));
                var form = measure.Scope == MeasureScope.At ? CurveForm.Rate : CurveForm.Total;
                return new CurvePlan { Ask = ask, Form = form, Alive = null, Gain = entered, GainRounding = MeasurePlan.SumRounding };
            default:
                var (gain, loss) = Earned(ask);
                return new CurvePlan { Ask = ask, Form = FormOf(measure.Kind), Alive = null, Gain = gain, Loss = loss };
        }
    }

    private SteadyPlan Steady(MeasureAsk ask)
    {
        switch (ask.Measure.Kind)
        {
            case MeasureKind.Entries:
                return new SteadyPlan { Ask = ask, Gain = vectors.Entering(vectors.Holds(ask.Measure.Condition!)), GainRounding = MeasurePlan.SumRounding };
            case MeasureKind.MeanSpell:
                var held = vectors.Holds(ask.Measure.Condition!);
                return new SteadyPlan { Ask = ask, Gain = vectors.Ones(held), Leaving = vectors.Entering(vectors.Not(held)) };
            default:
                var (gain, loss) = Earned(ask);
                return new SteadyPlan { Ask = ask, Gain = gain, Loss = loss };
        }
    }

    private PassagePlan Passage(MeasureAsk ask)
    {
        var measure = ask.Measure;
        if (measure.Until is { } until)
        {
            var (gain, loss) = Earned(ask);
            return new PassagePlan { Ask = ask, Alive = vectors.Not(vectors.Holds(until)), Gain = gain, Loss = loss };
        }

        return new PassagePlan { Ask = ask, Alive = vectors.Not(vectors.Holds(measure.Condition!)) };
    }

    private (double[] Gain, double[]? Loss) Earned(MeasureAsk ask) => ask.Measure.Condition is { } condition
        ? (vectors.Ones(vectors.Holds(condition)), null)
        : vectors.Split(ask.Measure.Object!.Rate);

    private Estimate StartIn(bool[] states)
    {
        var start = context.Chain.Start;
        return Estimate.Sum(Enumerable.Range(0, start.Length).Where(i => states[i] && start[i] > 0).Select(i => Estimate.Exact(start[i])));
    }

    private static CurveForm FormOf(MeasureKind kind) => kind switch
    {
        MeasureKind.Total => CurveForm.Total,
        MeasureKind.Average => CurveForm.Average,
        _ => CurveForm.Rate,
    };
}
