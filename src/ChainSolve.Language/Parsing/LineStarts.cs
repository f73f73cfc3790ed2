using ChainSolve.Language.Diagnostics;
using ChainSolve.Language.Lexing;
using Superpower.Model;

namespace ChainSolve.Language.Parsing;

/// <summary>What cannot stand first in a statement or clause, because it goes on with what stands before it.</summary>
internal static class LineStarts
{
    public static void Check(Token<TokenKind> token)
    {
        if (Words.IsNeverFirst(token.Kind) || (token.Kind == TokenKind.Name && Words.NeverFirst.Contains(token.Words())))
        {
            throw new SyntaxFaultException(
                TextCodes.LineStart, token.Place(), $"a line cannot begin with '{token.Words()}'; put it at the end of the line above");
        }

        if (token.Kind == TokenKind.OpenBrace)
        {
            throw new SyntaxFaultException(
                TextCodes.LineStart, token.Place(), "a '{' stands on the line of what it belongs to; put it at the end of the line above");
        }
    }
}
