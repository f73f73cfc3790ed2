using ChainSolve.Expressions;
using ChainSolve.Language.Diagnostics;
using ChainSolve.Modelling;

namespace ChainSolve.Binding;

/// <summary>The times of a measure as numbers, or what is wrong with them.</summary>
/// <param name="Times">In the time base, in the order as written; null where there are faults.</param>
/// <param name="Faults">Empty where there are times.</param>
internal sealed record TimesResolution(IReadOnlyList<double>? Times, IReadOnlyList<Diagnostic> Faults);

/// <summary>Works out the times of a measure for one set of givens.</summary>
internal sealed class TimesResolver
{
    /// <summary>The most times that a measure may have.</summary>
    public const int Most = 1_000_000;

    // Times and ends are the same within this, relative to the end.
    private const double Slack = 1e-12;

    private readonly TimeBase timeBase;
    private readonly double[] givens;
    private readonly List<double> times = [];
    private readonly List<Fault> faults = [];

    /// <param name="timeBase">The model's unit of time.</param>
    /// <param name="givens">The values of the givens.</param>
    /// <param name="parts">The times as written.</param>
    public TimesResolver(TimeBase timeBase, double[] givens, IReadOnlyList<BoundTimes> parts)
    {
        this.timeBase = timeBase;
        this.givens = givens;
        faults.AddRange(parts.Select(Add).OfType<Fault>());
    }

    /// <summary>What is wrong, in the order of the parts.</summary>
    public IReadOnlyList<Fault> Faults => faults;

    /// <summary>The times of a measure of a model.</summary>
    public static TimesResolution Resolve(BoundModel model, IReadOnlyList<BoundTimes> parts, GivenValues givens)
    {
        var resolver = new TimesResolver(model.TimeBase, givens.AsSpan().ToArray(), parts);
        return resolver.faults.Count == 0
            ? new TimesResolution(resolver.times, [])
            : new TimesResolution(null, [.. resolver.faults.Select(f => f.ToDiagnostic(model.Source, Severity.Fault))]);
    }

    private Fault? Add(BoundTimes part) => part switch
    {
        SingleTime single => AddSingle(single),
        StepTimes steps => AddSteps(steps),
        LogTimes logs => AddLog(logs),
        _ => throw new ArgumentException($"Unknown times {part.GetType().Name}.", nameof(part)),
    };

    private Fault? AddSingle(SingleTime single)
    {
        var time = Value(single.Time);
        return Wrong(single, time) ?? AddRun(single, 1, _ => time);
    }

    private Fault? AddSteps(StepTimes steps)
    {
        var (from, to, step) = (Value(steps.From), Value(steps.To), Value(steps.Step));
        if (WrongEnds(steps, from, to) is { } fault)
        {
            return fault;
        }

        if (!(step > 0) || !double.IsFinite(step))
        {
            return BindingFaults.TimeStep(steps.Span, Show(step));
        }

        var before = Math.Max(0, Math.Ceiling((to - from - (Slack * to)) / step));
        if (before == 0 && to > from)
        {
            before = 1;
        }

        return AddRun(steps, before + 1, k => k == before ? to : from + (k * step));
    }

    private Fault? AddLog(LogTimes logs)
    {
        var (from, to, written) = (Value(logs.From), Value(logs.To), Value(logs.Points));
        var points = Math.Round(written);
        if (WrongEnds(logs, from, to) is { } fault)
        {
            return fault;
        }

        if (from == 0)
        {
            return BindingFaults.TimeLogEnds(logs.Span, Show(from));
        }

        if (!(points >= 2) || Math.Abs(points - written) > 1e-9)
        {
            return BindingFaults.TimeLogPoints(logs.Span, written);
        }

        var last = points - 1;
        return AddRun(logs, points, k => k == 0 ? from : k == last ? to : from * Math.Pow(to / from, k / last));
    }

    private Fault? AddRun(BoundTimes part, double count, Func<int, double> at)
    {
        if (times.Count + count > Most)
        {
            return BindingFaults.TooManyTimes(part.Span, times.Count + count, Most);
        }

        for (var k = 0; k < count; k++)
        {
            times.Add(at(k));
        }

        return null;
    }

    private Fault? WrongEnds(BoundTimes part, double from, double to)
    {
        var fault = Wrong(part, from) ?? Wrong(part, to);
        return fault is null && to < from ? BindingFaults.TimesBackwards(part.Span, Show(from), Show(to)) : fault;
    }

    private Fault? Wrong(BoundTimes part, double time) =>
        time >= 0 && double.IsFinite(time) ? null : BindingFaults.TimeNegative(part.Span, Show(time));

    private double Value(NumberExpr expr) => GivenEvaluator.ValueOf(expr, givens);

    private string Show(double time) => GivenText.WithUnit(time, timeBase.Unit);
}
