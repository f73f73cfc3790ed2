using ChainSolve.Numerics.Estimates;
using ChainSolve.Numerics.Transient;

namespace ChainSolve.Measures;

/// <summary>Measures at times over one mask: one pass over the generator serves all their times and rewards.</summary>
internal sealed class CurveGroup(IReadOnlyList<CurvePlan> plans) : MeasureGroup
{
    public override MeasureAsk First => plans[0].Ask;

    public override IReadOnlyList<MeasureGroup> Apart() => [.. plans.Select(p => new CurveGroup([p]))];

    public override IReadOnlyList<MeasureAnswer> Solve(MeasureContext context)
    {
        var problem = new TransientProblem
        {
            Generator = context.Course.Segments[0].Generator,
            Start = context.Chain.Start,
            Alive = plans[0].Alive,
            Times = CurvePlan.Times(plans),
            Rates = Vectors(p => p.Form == CurveForm.Rate || (p.Form == CurveForm.Average && p.Ask.Times.Contains(0))),
            Totals = Vectors(p => p.Form != CurveForm.Rate),
        };
        var (result, choice) = TransientSolvers.Solve(
            problem, context.Options.TransientMethod, context.Options.TransientSolvers, context.Solve);
        var reader = new Reader(problem, result);
        return [.. plans.Select(p => new MeasureAnswer
        {
            Ask = p.Ask,
            Points = [.. p.Ask.Times.Select(t => reader.Read(p, t))],
            Method = choice.Solver.Name,
            Why = choice.Why,
            How = result.How,
        })];
    }

    private double[][] Vectors(Func<CurvePlan, bool> isMeant)
    {
        var meant = plans.Where(isMeant).ToArray();
        return [.. meant.Select(p => p.Gain).Concat(meant.Select(p => p.Loss).OfType<double[]>()).Distinct()];
    }

    private sealed class Reader(TransientProblem problem, TransientResult result)
    {
        private readonly double[] times = [.. problem.Times];
        private readonly Dictionary<double[], int> rates = Positions(problem.Rates);
        private readonly Dictionary<double[], int> totals = Positions(problem.Totals);

        public RawPoint Read(CurvePlan plan, double time)
        {
            var isRate = plan.Form == CurveForm.Rate || (plan.Form == CurveForm.Average && time == 0);
            var at = Array.BinarySearch(times, time);
            Estimate Part(double[] vector) => isRate ? result.Rates[at][rates[vector]] : result.Totals[at][totals[vector]];

            var gain = Part(plan.Gain) * new Estimate(1, plan.GainRounding, true);
            var loss = plan.Loss is { } taken ? Part(taken) : Estimate.Zero;
            var value = plan.Offset + gain - loss;
            var scale = plan.Offset.Value + gain.Value + loss.Value;
            return plan.Form == CurveForm.Average && !isRate
                ? new RawPoint(time, value / time, scale / time)
                : new RawPoint(time, value, scale);
        }

        private static Dictionary<double[], int> Positions(IReadOnlyList<double[]> vectors)
        {
            var positions = new Dictionary<double[], int>(ReferenceEqualityComparer.Instance);
            for (var i = 0; i < vectors.Count; i++)
            {
                positions[vectors[i]] = i;
            }

            return positions;
        }
    }
}
