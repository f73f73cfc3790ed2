using ChainSolve.Language.Diagnostics;
using ChainSolve.Language.Parsing;
using ChainSolve.Language.Syntax;
using ChainSolve.Language.Text;

namespace ChainSolve.Language.Tests.Support;

/// <summary>Reads texts in tests.</summary>
internal static class Read
{
    public const string FileName = "m.chain";

    /// <summary>A model that must be without faults.</summary>
    public static ModelSyntax Model(string text)
    {
        var result = ModelParser.Parse(new SourceText(FileName, text));
        Assert.True(result.Diagnostics.Count == 0, Shown(result.Diagnostics));
        return result.Model;
    }

    /// <summary>The only statement of a text, which must be of a type.</summary>
    public static T Statement<T>(string text)
        where T : StatementSyntax => Assert.IsType<T>(Assert.Single(Model(text).Statements));

    /// <summary>The only clause of the only item of a text.</summary>
    public static T Clause<T>(string clause)
        where T : ItemClauseSyntax => Assert.IsType<T>(Assert.Single(Statement<ItemSyntax>($"item a {{\n{clause}\n}}").Clauses));

    /// <summary>An expression that must be without faults.</summary>
    public static ExpressionSyntax Expression(string text)
    {
        var result = ModelParser.ParseExpression(new SourceText(FileName, text));
        Assert.True(result.Diagnostics.Count == 0, Shown(result.Diagnostics));
        return result.Expression!;
    }

    /// <summary>The faults of a text, each as <c>line:column code</c>.</summary>
    public static string[] Faults(string text) =>
        [.. ModelParser.Parse(new SourceText(FileName, text)).Diagnostics.Select(d => $"{d.Position.Line}:{d.Position.Column} {d.Code}")];

    /// <summary>The faults of a text as people see them, a blank line between.</summary>
    public static string Rendered(string text) => Shown(ModelParser.Parse(new SourceText(FileName, text)).Diagnostics);

    /// <summary>The statements of a text that could be read, each as its type's name.</summary>
    public static string[] Kinds(string text) =>
        [.. ModelParser.Parse(new SourceText(FileName, text)).Model.Statements.Select(s => s.GetType().Name.Replace("Syntax", "", StringComparison.Ordinal))];

    private static string Shown(IEnumerable<Diagnostic> diagnostics) => string.Join("\n\n", diagnostics.Select(DiagnosticRenderer.Render));
}
