using System.Globalization;
using ChainSolve.Language.Syntax;
using ChainSolve.Numerics.Absorption;
using ChainSolve.Numerics.Estimates;
using ChainSolve.Numerics.Iteration;

namespace ChainSolve.Measures;

/// <summary>Measures up to the first time at which one condition is met: they share the solution of the chain up to there.</summary>
internal sealed class PassageGroup(IReadOnlyList<PassagePlan> plans) : MeasureGroup
{
    public override MeasureAsk First => plans[0].Ask;

    public override IReadOnlyList<MeasureGroup> Apart() => [.. plans.Select(p => new PassageGroup([p]))];

    public override IReadOnlyList<MeasureAnswer> Solve(MeasureContext context)
    {
        var highest = plans.Max(p => p.Ask.Measure.Kind switch
        {
            MeasureKind.QuantileTime => 0,
            MeasureKind.DeviationTime => 2,
            _ => 1,
        });
        var passage = highest == 0
            ? null
            : FirstPassage.Solve(Segment(context), context.Chain.Start, plans[0].Alive, highest, context.Solvers, context.Solve);
        return [.. plans.Select(p => Read(p, passage, context))];
    }

    private static Numerics.Operators.Generator Segment(MeasureContext context) => context.Course.Segments[0].Generator;

    private static MeasureAnswer Read(PassagePlan plan, FirstPassage? passage, MeasureContext context)
    {
        try
        {
            return plan.Ask.Measure.Kind == MeasureKind.QuantileTime
                ? Quantile(plan, context)
                : Moment(plan, passage!, context) with { Method = passage!.Method, Why = passage.Why, How = passage.How };
        }
        catch (NotConvergedException failure)
        {
            return new MeasureAnswer { Ask = plan.Ask, Failure = failure.Message, Method = passage?.Method ?? "none" };
        }
    }

    private static MeasureAnswer Moment(PassagePlan plan, FirstPassage passage, MeasureContext context)
    {
        if (plan.Gain is not null)
        {
            return Total(plan, passage, context);
        }

        var point = passage.IsCertain
            ? RawPoint.Of(plan.Ask.Measure.Kind == MeasureKind.DeviationTime ? Root(passage.Variance()) : passage.MeanTime)
            : RawPoint.Of(Estimate.Infinite, Never(passage, context));
        return new MeasureAnswer { Ask = plan.Ask, Points = [point] };
    }

    private static MeasureAnswer Total(PassagePlan plan, FirstPassage passage, MeasureContext context)
    {
        var gain = passage.Reward(plan.Gain!);
        var loss = plan.Loss is { } taken ? passage.Reward(taken) : Estimate.Zero;
        var (isGainEndless, isLossEndless) = (double.IsInfinity(gain.Value), double.IsInfinity(loss.Value));
        if (isGainEndless && isLossEndless)
        {
            return new MeasureAnswer { Ask = plan.Ask, Failure = "both what is gained and what is lost may grow without end, so that the total has no value" };
        }

        if (isGainEndless || isLossEndless)
        {
            var rewards = isGainEndless ? plan.Gain! : plan.Loss!;
            var group = passage.ClosedClasses.First(c => c.Any(i => rewards[i] > 0));
            var total = isGainEndless ? Estimate.Infinite : -Estimate.Infinite;
            return new MeasureAnswer { Ask = plan.Ask, Points = [RawPoint.Of(total, $"the total may grow without end: {Stuck(group, context)}")] };
        }

        return new MeasureAnswer { Ask = plan.Ask, Points = [new RawPoint(null, gain - loss, gain.Value + loss.Value)] };
    }

    private static MeasureAnswer Quantile(PassagePlan plan, MeasureContext context)
    {
        var share = plan.Ask.Share;
        var found = PassageQuantiles.Find(
            Segment(context),
            context.Chain.Start,
            plan.Alive,
            share,
            context.Options.TransientMethod,
            context.Options.TransientSolvers,
            context.Solvers,
            context.Solve);
        var reason = !double.IsInfinity(found.Time.Value) ? null
            : share == 1 ? "at no time has the condition been met for certain"
            : string.Create(CultureInfo.InvariantCulture, $"the condition is ever met with the chance {found.ChanceOfLeaving.Value:G4} only, which is below {share:G4}");
        return new MeasureAnswer { Ask = plan.Ask, Points = [RawPoint.Of(found.Time, reason)], Method = found.Method, Why = found.Why, How = found.How };
    }

    private static Estimate Root(Estimate square)
    {
        var root = Math.Sqrt(square.Value);
        if (root == 0)
        {
            return square.Bound == 0 ? Estimate.Zero : new Estimate(0, Math.BitIncrement(Math.Sqrt(square.Bound)), square.IsProved);
        }

        // The difference of two roots is the difference of the squares over the sum of the roots, and that sum is at least this root.
        var lowest = Math.Sqrt(Math.Max(0, square.Value - square.Bound));
        return new Estimate(root, ((square.Bound / (root + lowest)) + (root * 2.3e-16)) * (1 + 1e-15), square.IsProved);
    }

    private static string Never(FirstPassage passage, MeasureContext context)
    {
        var chance = passage.ChanceOfStaying.Value;
        return string.Create(CultureInfo.InvariantCulture, $"the condition is never met with a chance of {chance:g3}: {Stuck(passage.ClosedClasses[0], context)}");
    }

    private static string Stuck(int[] group, MeasureContext context)
    {
        var state = context.Chain.Describe(group[0]);
        return group.Length == 1
            ? $"the model can come to '{state}' and stay there"
            : string.Create(CultureInfo.InvariantCulture, $"the model can come to a group of {group.Length:N0} states around '{state}' and stay there");
    }
}
