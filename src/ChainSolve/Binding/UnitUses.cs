using ChainSolve.Language.Syntax;
using ChainSolve.Language.Text;

namespace ChainSolve.Binding;

/// <summary>Counts the units of a text, <c>%</c> aside: a text without any is not checked for dimensions.</summary>
internal static class UnitUses
{
    /// <summary>How many there are, and where the first is; null where there is none.</summary>
    public static (int Count, TextSpan? First) In(ModelSyntax model)
    {
        var spans = model.Statements
            .SelectMany(StatementParts.Expressions)
            .SelectMany(SyntaxParts.All)
            .Select(Span)
            .OfType<TextSpan>()
            .ToHashSet();
        return (spans.Count, spans.Count == 0 ? null : spans.MinBy(s => s.Start));
    }

    private static TextSpan? Span(ExpressionSyntax syntax) => syntax switch
    {
        UnitSyntax { Unit: { Text: not "%" } unit } => unit.Span,
        PerUnitSyntax per => per.Unit.Span,
        _ => null,
    };
}
