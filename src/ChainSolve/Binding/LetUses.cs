using ChainSolve.Language.Syntax;

namespace ChainSolve.Binding;

/// <summary>Which lets a let names, its parameters aside.</summary>
internal static class LetUses
{
    /// <summary>The lets in the order of the text; one that is used twice stands twice.</summary>
    public static IEnumerable<LetSymbol> Of(LetSymbol let, NameTable names)
    {
        var hidden = let.Syntax.Parameters?.Select(p => p.Text).ToHashSet(StringComparer.Ordinal) ?? [];
        foreach (var syntax in SyntaxParts.All(let.Syntax.Value))
        {
            // A call is of a function, a bare name of a value: the other way round is a fault elsewhere and no use.
            var used = syntax switch
            {
                NameSyntax { Name.Text: var name } when !hidden.Contains(name) => names.Find(name) as LetSymbol,
                CallSyntax call => names.Find(call.Function.Text) as LetSymbol,
                _ => null,
            };
            if (used is not null && used.IsFunction == syntax is CallSyntax)
            {
                yield return used;
            }
        }
    }
}
