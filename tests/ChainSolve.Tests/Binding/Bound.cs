using ChainSolve.Binding;
using ChainSolve.Expressions;
using ChainSolve.Language.Diagnostics;
using ChainSolve.Language.Parsing;
using ChainSolve.Language.Text;
using ChainSolve.Modelling;

namespace ChainSolve.Tests.Binding;

/// <summary>Binds texts and evaluates what came of it.</summary>
internal static class Bound
{
    public static BoundModel Model(string text)
    {
        var result = Result(text);
        Assert.True(result.Model is not null, string.Join("\n", result.Diagnostics.Select(Show)));
        return result.Model!;
    }

    /// <summary>The faults as <c>line:column code message</c>.</summary>
    public static string[] Faults(string text)
    {
        var result = Result(text);
        Assert.True(result.Model is null, "there are no faults");
        return [.. result.Diagnostics.Select(Show)];
    }

    public static string[] Warnings(string text) => [.. Model(text).Warnings.Select(Show)];

    public static BindResult Result(string text)
    {
        var parsed = ModelParser.Parse(new SourceText("test.chain", text));
        Assert.True(parsed.Diagnostics.Count == 0, string.Join("\n", parsed.Diagnostics.Select(Show)));
        return Binder.Bind(parsed.Model);
    }

    public static string Show(Diagnostic d) => FormattableString.Invariant($"{d.Position.Line}:{d.Position.Column} {d.Code} {d.Message}");

    /// <summary>The value of an expression in a marking written as name and number; unnamed variables are 0.</summary>
    public static double Value(BoundModel model, Expr expr, params (string Name, int Value)[] marking)
    {
        var values = new int[model.Variables.Count];
        foreach (var (name, value) in marking)
        {
            var index = model.Variables.ToList().FindIndex(v => v.Name == name);
            Assert.True(index >= 0, $"no variable {name}");
            values[index] = value;
        }

        return ValueAt(model, expr, values);
    }

    public static double ValueAt(BoundModel model, Expr expr, int[] marking)
    {
        var givens = new GivenResolver(model).Defaults().Values!.AsSpan();
        var outputs = new double[1];
        ExprCompiler.Compile([expr]).Run(marking, givens, outputs);
        return outputs[0];
    }

    public static BoundTransition Transition(BoundModel model, string label) =>
        Assert.Single(model.Transitions, t => t.Label == label);

    /// <summary>The rate of a transition in a marking; 0 where its guard does not hold.</summary>
    public static double Rate(BoundModel model, string label, params (string Name, int Value)[] marking)
    {
        var transition = Transition(model, label);
        return transition.Guard is not null && Value(model, transition.Guard, marking) == 0
            ? 0
            : Value(model, transition.Rate, marking);
    }

    /// <summary>The value of <c>let probe</c>, which has to be a number, by way of a measure.</summary>
    public static double Probe(string text, params (string Name, int Value)[] marking)
    {
        var model = Model(text + "\nmeasure probed = expected probe steady");
        return Value(model, model.Measures[^1].Object!.Rate, marking);
    }
}
