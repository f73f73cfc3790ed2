using ChainSolve.Numerics.Estimates;
using ChainSolve.Numerics.Iteration;

namespace ChainSolve.Measures;

/// <summary>Measures in groups that share their work. Immutable; safe to share between threads.</summary>
internal sealed class MeasurePlan
{
    /// <summary>The relative error of a sum of rates out of a state.</summary>
    internal const double SumRounding = 1.2e-16;

    private readonly IReadOnlyList<MeasureAsk> asks;

    private MeasurePlan(IReadOnlyList<MeasureAsk> asks, IReadOnlyList<MeasureGroup> groups)
    {
        (this.asks, Groups) = (asks, groups);
    }

    /// <summary>The groups: one for each mask of values at times, one for the long run, one for each condition whose first time counts.</summary>
    public IReadOnlyList<MeasureGroup> Groups { get; }

    /// <summary>Evaluates the conditions and rewards of measures and groups them.</summary>
    /// <exception cref="ModelFaultsException">A condition or reward has no value in some state.</exception>
    public static MeasurePlan Of(IReadOnlyList<MeasureAsk> asks, MeasureContext context)
    {
        var planner = new MeasurePlanner(context);
        foreach (var ask in asks)
        {
            context.Solve.Cancellation.ThrowIfCancellationRequested();
            try
            {
                planner.Add(ask);
            }
            catch (ModelFaultsException exception)
            {
                // States know nothing of measures: the place is put in here.
                throw new ModelFaultsException([.. exception.Faults.Select(f => f with { Span = ask.Measure.Span })]);
            }
        }

        return new MeasurePlan(asks, planner.Groups());
    }

    /// <summary>Solves all groups and judges the values, in the order in which the measures were asked.</summary>
    public IReadOnlyList<JudgedMeasure> Run(MeasureContext context)
    {
        var answers = Groups.SelectMany(g => Solve(g, context)).ToDictionary(a => a.Ask, (IEqualityComparer<MeasureAsk>)ReferenceEqualityComparer.Instance);
        return [.. asks.Select(a => new JudgedMeasure(Judge(answers[a], context.Options), answers[a]))];
    }

    /// <summary>Where shared work fails, each measure is tried alone.</summary>
    private static IEnumerable<MeasureAnswer> Solve(MeasureGroup group, MeasureContext context)
    {
        context.Solve.Cancellation.ThrowIfCancellationRequested();
        try
        {
            return group.Solve(context);
        }
        catch (NotConvergedException failure)
        {
            var parts = group.Apart();
            return parts.Count == 1 ? [new MeasureAnswer { Ask = group.First, Failure = failure.Message }] : parts.SelectMany(p => Solve(p, context));
        }
    }

    private static MeasureResult Judge(MeasureAnswer answer, SolveOptions options)
    {
        var measure = answer.Ask.Measure;
        var states = answer.Points.Select(p => Accuracy.Judge(p, options)).ToArray();
        var failure = answer.Failure ?? (states.Contains(SolveStatus.Failed) ? "no value with a finite error bound came out" : null);
        var isShort = states.Contains(SolveStatus.Short);
        return new MeasureResult
        {
            Name = measure.Name,
            Kind = MeasureWords.Of(measure.Kind),
            Sentence = measure.Sentence,
            Unit = measure.Unit,
            Points = failure is not null ? [] : [.. answer.Points.Select((p, i) => new MeasurePoint
            {
                Time = p.Time,
                Value = p.Value.Value,
                ErrorBound = p.Value.Bound,
                IsProved = p.Value.IsProved,
                Status = states[i],
                Reason = p.Reason,
            })],
            Status = failure is not null ? SolveStatus.Failed : isShort ? SolveStatus.Short : SolveStatus.Ok,
            Reason = failure ?? (isShort ? FormattableString.Invariant($"an error bound is wider than the {options.Tolerance:0.###e-0} of the value that was asked for") : null),
            Method = answer.Method,
            Why = answer.Why,
            How = answer.How,
            TimesUnit = measure.TimesUnit,
        };
    }
}
