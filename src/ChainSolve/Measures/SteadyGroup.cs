using System.Globalization;
using ChainSolve.Language.Diagnostics;
using ChainSolve.Numerics.Estimates;
using ChainSolve.Numerics.Stationary;

namespace ChainSolve.Measures;

/// <summary>Measures of the long run: one solution of the chain serves all of them.</summary>
internal sealed class SteadyGroup(IReadOnlyList<SteadyPlan> plans) : MeasureGroup
{
    // More groups than this are counted, not listed.
    private const int MostListed = 4;

    public override MeasureAsk First => plans[0].Ask;

    public override IReadOnlyList<MeasureGroup> Apart() => [.. plans.Select(p => new SteadyGroup([p]))];

    public override IReadOnlyList<MeasureAnswer> Solve(MeasureContext context)
    {
        var result = LongRun.Solve(context.Course.Segments[0].Generator, context.Chain.Start, context.Solvers, context.Solve);
        var method = result.StationaryMethod == "none" ? result.AbsorptionMethod : result.StationaryMethod;
        return [.. plans.Select((p, i) => Read(p, result) with
        {
            Method = method,
            Why = result.Why,
            How = result.How,
            Warnings = i == 0 && result.Classes.Count > 1 ? [SeveralClasses(result, context)] : [],
        })];
    }

    private static MeasureAnswer Read(SteadyPlan plan, LongRunResult result)
    {
        var gain = result.Expected(plan.Gain) * new Estimate(1, plan.GainRounding, true);
        if (plan.Leaving is { } leaving)
        {
            return Spell(plan.Ask, gain, result.Expected(leaving) * new Estimate(1, MeasurePlan.SumRounding, true));
        }

        var loss = plan.Loss is { } taken ? result.Expected(taken) : Estimate.Zero;
        return new MeasureAnswer { Ask = plan.Ask, Points = [new RawPoint(null, gain - loss, gain.Value + loss.Value)] };
    }

    private static MeasureAnswer Spell(MeasureAsk ask, Estimate fraction, Estimate frequency)
    {
        if (fraction.Value == 0)
        {
            return new MeasureAnswer { Ask = ask, Failure = "the condition never holds in the long run, so that it has no spells" };
        }

        return new MeasureAnswer
        {
            Ask = ask,
            Points = frequency.Value == 0
                ? [RawPoint.Of(Estimate.Infinite, "in the long run the condition does not end once it holds")]
                : [RawPoint.Of(fraction / frequency)],
        };
    }

    private Diagnostic SeveralClasses(LongRunResult result, MeasureContext context)
    {
        var listed = result.Classes.OrderByDescending(c => c.Chance.Value).Take(MostListed).Select(c =>
        {
            var states = c.States.Length == 1 ? "" : string.Create(CultureInfo.InvariantCulture, $" and {c.States.Length - 1:N0} more");
            return string.Create(CultureInfo.InvariantCulture, $"{c.Chance.Value:g3} for '{context.Chain.Describe(c.States[0])}'{states}");
        });
        var rest = result.Classes.Count > MostListed
            ? string.Create(CultureInfo.InvariantCulture, $", {result.Classes.Count - MostListed:N0} further groups")
            : "";
        var model = context.Chain.Model;
        return new Diagnostic(
            NumericCodes.SeveralClasses.Code,
            Severity.Warning,
            string.Create(
                CultureInfo.InvariantCulture,
                $"the model can end in {result.Classes.Count:N0} groups of states that it never leaves; steady values weigh them by the chance of each: {string.Join(", ", listed)}{rest}"),
            First.Measure.Span,
            model.Source);
    }
}
