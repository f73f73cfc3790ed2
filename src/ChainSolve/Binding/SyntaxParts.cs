using ChainSolve.Language.Syntax;

namespace ChainSolve.Binding;

/// <summary>Walks expressions without recursion.</summary>
internal static class SyntaxParts
{
    /// <summary>An expression and all that it is made of, in the order of the text.</summary>
    public static IEnumerable<ExpressionSyntax> All(ExpressionSyntax root)
    {
        var open = new Stack<ExpressionSyntax>([root]);
        while (open.TryPop(out var syntax))
        {
            yield return syntax;
            foreach (var part in Of(syntax).Reverse())
            {
                open.Push(part);
            }
        }
    }

    private static IEnumerable<ExpressionSyntax> Of(ExpressionSyntax syntax) => syntax switch
    {
        UnitSyntax unit => [unit.Operand],
        BracketSyntax bracket => [bracket.Inner],
        UnarySyntax unary => [unary.Operand],
        BinarySyntax binary => [binary.Left, binary.Right],
        ChainSyntax chain => chain.Rest.Select(link => link.Operand).Prepend(chain.First),
        ConditionalSyntax conditional => [conditional.Condition, conditional.WhenTrue, conditional.WhenFalse],
        CallSyntax call => call.Arguments,
        _ => [],
    };
}
