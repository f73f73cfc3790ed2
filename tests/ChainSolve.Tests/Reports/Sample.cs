using ChainSolve.Expressions;
using ChainSolve.Language.Diagnostics;
using ChainSolve.Language.Text;
using ChainSolve.Modelling;
using ChainSolve.Numerics.Estimates;

namespace ChainSolve.Tests.Reports;

/// <summary>Results made up to show every way in which they can come out.</summary>
internal static class Sample
{
    private const string Text = "model \"Lift, \\\"old\\\"\"\nmeasure first = mean time to stopped";

    private static readonly SourceText Source = new("lift.chain", Text);

    public static Model Model(string? title = "Lift, \"old\"") => new(
        new BoundModel
        {
            Source = Source,
            Title = title,
            TimeBase = TimeBase.Hour,
            Givens = [Given("lambda", -1, new OutsideUnit("per y", 1.0 / 8760)), Given("n", 0, new OutsideUnit("", 1)), Given("wait", 1, null)],
            Items = [],
            Counters = [],
            Variables = [],
            Transitions = [],
            Rewards = [],
            Measures = [],
            Warnings = [],
        },
        new GivenValues([3.0 / 8760, 2, 84]),
        new ChainHolder((_, _, _, _) => throw new InvalidOperationException("Nothing is solved here.")),
        [],
        []);

    public static Solution Solution() => new()
    {
        Model = Model(),
        StateCount = 1234,
        TransitionCount = 1,
        Elapsed = TimeSpan.FromMilliseconds(12.34),
        Warnings = [new Diagnostic("N201", Severity.Warning, "the model can end in 2 groups", new TextSpan(30, 5), Source)],
        Measures = new MeasureResults(
        [
            Measure("availability", "probability", "probability flowing at 0 d, 1 d, 10 d", "") with
            {
                TimesUnit = new OutsideUnit("d", 24),
                Points = [Point(0, 1, 0), Point(24, 0.99665712345678901, 2.3e-16), Point(240, 12.5e-12, 1.04e-19)],
            },
            Measure("costs", "total", "total cost over 8760 h, 1000 h", "EUR") with
            {
                TimesUnit = new OutsideUnit("h", 1),
                Points = [Point(8760, 27886.0720567508, 0.0004), Point(1000, -15.25, 3e-12) with { IsProved = false }],
            },
            Measure("first", "mean time", "mean time to stopped", "h") with
            {
                Points = [Point(null, double.PositiveInfinity, 0) with { Reason = "the condition is never met" }],
                Method = "none",
                How = "no time is spent before the end",
            },
            Measure("rough", "expected", "expected flow steady", "per h") with
            {
                Points = [Point(null, 1234.5, 20) with { Status = SolveStatus.Short }],
                Status = SolveStatus.Short,
                Reason = "an error bound is wider than the 1e-9 of the value that was asked for",
            },
            Measure("spell", "mean spell", "mean spell stopped steady", "h") with
            {
                Status = SolveStatus.Failed,
                Reason = "the condition never holds, so that it has no spells",
            },
        ]),
    };

    private static MeasureResult Measure(string name, string kind, string sentence, string unit) => new()
    {
        Name = name,
        Kind = kind,
        Sentence = sentence,
        Unit = unit,
        Points = [],
        Status = SolveStatus.Ok,
        Reason = null,
        Method = "squaring",
        Why = "the chain is small",
        How = "4 states, 25 levels",
    };

    private static MeasurePoint Point(double? time, double value, double bound) =>
        new() { Time = time, Value = value, ErrorBound = bound, IsProved = true, Status = SolveStatus.Ok };

    private static BoundGiven Given(string name, int power, OutsideUnit? unit) => new()
    {
        Name = name,
        Default = new ConstantExpr(0),
        TimePower = power,
        OutsideUnit = unit,
        Range = null,
        Spread = null,
        ShapesStates = false,
        Span = new TextSpan(0, 0),
    };
}
