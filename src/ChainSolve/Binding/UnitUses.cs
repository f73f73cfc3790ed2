using ChainSolve.Language.Syntax;
using ChainSolve.Language.Text;

namespace ChainSolve.Binding;

/// <summary>Counts the units of a text, <c>%</c> aside: a text without any is not checked for dimensions.</summary>
internal static class UnitUses
{
    /// <summary>How many there are, and where the first is; null where there is none.</summary>
    public static (int Count, TextSpan? First) In(ModelSyntax model)
    {
        var units = new HashSet<Identifier>();
        TextSpan? first = null;
        foreach (var expression in model.Statements.SelectMany(StatementParts.Expressions).SelectMany(SyntaxParts.All))
        {
            if (UnitOf(expression) is { } unit && units.Add(unit) && !(unit.Span.Start >= first?.Start))
            {
                first = unit.Span;
            }
        }

        return (units.Count, first);
    }

    private static Identifier? UnitOf(ExpressionSyntax syntax) => syntax switch
    {
        UnitSyntax { Unit: { Text: not "%" } unit } => unit,
        PerUnitSyntax per => per.Unit,
        _ => null,
    };
}
