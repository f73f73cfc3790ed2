using ChainSolve.Language.Lexing;
using Superpower.Model;
using TextSpan = ChainSolve.Language.Text.TextSpan;

namespace ChainSolve.Language.Parsing;

/// <summary>
/// Cuts the tokens of a text into statements by the rules for line ends, so that a fault in one statement swallows no other.
/// </summary>
internal sealed class StatementSlicer
{
    private readonly List<StatementSlice> slices = [];
    private readonly List<Token<TokenKind>> current = [];
    private readonly Stack<(Token<TokenKind> Brace, int OuterBrackets)> braces = new();
    private int brackets;

    private StatementSlicer()
    {
    }

    public static IReadOnlyList<StatementSlice> Cut(ReadOnlySpan<Token<TokenKind>> tokens)
    {
        var slicer = new StatementSlicer();
        var firstOnLine = true;
        foreach (var token in tokens)
        {
            slicer.Take(token, firstOnLine);
            firstOnLine = token.Kind == TokenKind.LineEnd;
        }

        slicer.End();
        return slicer.slices;
    }

    private void Take(Token<TokenKind> token, bool firstOnLine)
    {
        if (firstOnLine && braces.Count == 0 && current.Count > 0 && token.Kind == TokenKind.Name && Words.Statements.Contains(token.Words()))
        {
            End();
        }

        switch (token.Kind)
        {
            case TokenKind.LineEnd when current.Count == 0 || brackets > 0 || Joins(current[^1]):
                return;
            case TokenKind.LineEnd when braces.Count == 0:
                End();
                return;
            case TokenKind.OpenBracket:
                brackets++;
                break;
            case TokenKind.CloseBracket:
                brackets = Math.Max(0, brackets - 1);
                break;
            case TokenKind.OpenBrace:
                braces.Push((token, brackets));
                brackets = 0;
                break;
            case TokenKind.CloseBrace when braces.Count > 0:
                brackets = braces.Pop().OuterBrackets;
                break;
            case TokenKind.CloseBrace:
                End();
                current.Add(token);
                End();
                return;
        }

        current.Add(token);
    }

    private static bool Joins(Token<TokenKind> token) =>
        Words.IsJoining(token.Kind) || (token.Kind == TokenKind.Name && Words.Joining.Contains(token.Words()));

    private void End()
    {
        (TextSpan Span, string Message)? fault = braces.Count > 0
            ? (braces.Peek().Brace.Place(), "this '{' is not closed; put a '}' behind its last clause")
            : null;
        if (current.Count > 0)
        {
            slices.Add(new StatementSlice([.. current], fault));
        }

        current.Clear();
        braces.Clear();
        brackets = 0;
    }
}
