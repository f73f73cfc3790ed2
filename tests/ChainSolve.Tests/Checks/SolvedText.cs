using ChainSolve.Language.Parsing;
using ChainSolve.Language.Printing;
using ChainSolve.Language.Text;
using ChainSolve.Numerics.Estimates;
using ChainSolve.Tests.Shared.Checks;

namespace ChainSolve.Tests.Checks;

/// <summary>A model text solved through the library: the values of its measures with their bounds.</summary>
internal sealed class SolvedText(IReadOnlyDictionary<string, IReadOnlyList<Bounded>> values)
{
    public IReadOnlyDictionary<string, IReadOnlyList<Bounded>> Values { get; } = values;

    /// <summary>Solves a model; measures that fail are left out, and only those named may.</summary>
    public static SolvedText Solve(string text, params string[] mayFail)
    {
        var measures = Model.Parse(text).Solve().Measures;
        Assert.All(measures, m => Assert.True(m.Status != SolveStatus.Failed || mayFail.Contains(m.Name), $"{m.Name}: {m.Reason}\n{text}"));
        return new SolvedText(measures.Where(m => m.Status != SolveStatus.Failed).ToDictionary(
            m => m.Name, m => (IReadOnlyList<Bounded>)[.. m.Points.Select(p => new Bounded(p.Value, p.ErrorBound))]));
    }

    /// <summary>The model as the printer writes it.</summary>
    public static string Print(string text)
    {
        var parsed = ModelParser.Parse(new SourceText("model", text));
        Assert.Empty(parsed.Diagnostics);
        return ModelPrinter.Print(parsed.Model);
    }

    /// <summary>The value of a measure that has one.</summary>
    public Bounded Single(string name) => Assert.Single(Values[name]);
}
