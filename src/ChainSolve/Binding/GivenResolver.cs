using ChainSolve.Language.Diagnostics;
using ChainSolve.Language.Parsing;
using ChainSolve.Language.Syntax;
using ChainSolve.Language.Text;
using ChainSolve.Modelling;

namespace ChainSolve.Binding;

/// <summary>Puts values from outside into a model's givens; those that are not set follow. Immutable; safe to share between threads.</summary>
internal sealed class GivenResolver(BoundModel model)
{
    /// <summary>The values of the givens as the model has them.</summary>
    public GivenResolution Defaults() => Resolve([]);

    /// <summary>The values with some of them set.</summary>
    public GivenResolution Resolve(IReadOnlyList<GivenSetting> settings)
    {
        var faults = new List<Diagnostic>();
        var echoes = new List<string>();
        var set = new double?[model.Givens.Count];
        var sources = new SourceText?[set.Length];
        foreach (var setting in settings)
        {
            var index = IndexOf(setting.Name);
            var source = new SourceText("setting", setting.Name);
            if (index < 0)
            {
                Report(source, BindingFaults.UnknownGiven(Whole(source), setting.Name, [.. model.Givens.Select(g => g.Name)]));
            }
            else if (sources[index] is not null)
            {
                Report(source, BindingFaults.SetTwice(Whole(source), setting.Name));
            }
            else
            {
                source = new SourceText($"setting of {setting.Name}", setting.Text ?? GivenText.Number(setting.Number));
                sources[index] = source;
                set[index] = Read(setting, source, model.Givens[index], faults, echoes);
            }
        }

        if (faults.Count > 0)
        {
            return new GivenResolution(null, faults, echoes);
        }

        var values = GivenEvaluator.Evaluate(model.Givens, set);
        Check(values, sources, Report);
        return faults.Count > 0 ? new GivenResolution(null, faults, echoes) : new GivenResolution(new GivenValues(values), [], echoes);

        void Report(SourceText source, Fault fault) =>
            faults.Add(fault.ToDiagnostic(source, Severity.Fault));
    }

    private static TextSpan Whole(SourceText source) => new(0, source.Content.Length);

    private int IndexOf(string name)
    {
        for (var i = 0; i < model.Givens.Count; i++)
        {
            if (model.Givens[i].Name == name)
            {
                return i;
            }
        }

        return -1;
    }

    private void Check(double[] values, SourceText?[] sources, Action<SourceText, Fault> report)
    {
        // Those that follow are judged only where what they follow is right.
        if (!CheckGivens(values, i => sources[i], report) || !CheckGivens(values, i => sources[i] is null ? model.Source : null, report))
        {
            return;
        }

        foreach (var fault in ModelChecks.Check(model.Items, model.Counters, model.Crews, model.Transitions, values))
        {
            report(model.Source, fault);
        }
    }

    private bool CheckGivens(double[] values, Func<int, SourceText?> sourceOf, Action<SourceText, Fault> report)
    {
        var isRight = true;
        for (var i = 0; i < values.Length; i++)
        {
            if (sourceOf(i) is { } source && GivenChecks.Check(model.Givens[i], values, values[i], model.TimeBase) is { } fault)
            {
                isRight = false;
                report(source, source == model.Source ? fault : fault with { Span = Whole(source) });
            }
        }

        return isRight;
    }

    private double? Read(GivenSetting setting, SourceText source, BoundGiven given, List<Diagnostic> faults, List<string> echoes)
    {
        var sink = new FaultSink(source);
        var value = setting.Text is null
            ? Bare(setting.Number, source.Content, given, sink, echoes)
            : ReadText(source, given, sink, faults, echoes);
        faults.AddRange(sink.Finish(0, null));
        return value;
    }

    private double? ReadText(SourceText source, BoundGiven given, FaultSink sink, List<Diagnostic> faults, List<string> echoes)
    {
        var parsed = ModelParser.ParseExpression(source);
        if (parsed.Expression is not { } syntax)
        {
            faults.AddRange(parsed.Diagnostics);
            return null;
        }

        var context = new BindContext(source, sink, model.TimeBase);
        var binder = new ExpressionBinder(context, new NameTable());
        if (binder.BindNumber(syntax, new ExprScope { NoNames = true }, "a given") is not { } value)
        {
            return null;
        }

        var number = GivenEvaluator.ValueOf(value.Expr, []);
        var units = SyntaxParts.All(syntax).Where(s => s is UnitSyntax or PerUnitSyntax).ToList();
        if (units.Count == 0)
        {
            return Bare(number, source.Content.Trim(), given, sink, echoes);
        }

        if (model.TimeBase.IsUnitless && units.Exists(u => u is not UnitSyntax { Unit.Text: "%" }))
        {
            sink.Report(BindingFaults.UnitUnwanted(syntax.Span));
            return null;
        }

        return new DimensionRules(context).Require(value, syntax, new Dimension(given.TimePower), $"'{given.Name}'") ? number : null;
    }

    private double? Bare(double number, string written, BoundGiven given, FaultSink sink, List<string> echoes)
    {
        if (given.OutsideUnit is { } unit)
        {
            if (unit.Text.Length > 0)
            {
                echoes.Add($"{given.Name} = {GivenText.WithUnit(number, unit.Text)}");
            }

            return unit.ToBase(number);
        }

        if (number == 0)
        {
            return 0;
        }

        var span = Whole(sink.Source);
        sink.Report(given.TimePower == 0
            ? BindingFaults.PercentWanted(span, given.Name, written)
            : BindingFaults.UnitWanted(span, given.Name, new Dimension(given.TimePower), written, GivenText.BaseUnit(given.TimePower, model.TimeBase)));
        return null;
    }
}
