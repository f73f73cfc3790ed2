using ChainSolve.Language.Lexing;
using ChainSolve.Language.Syntax;
using Superpower;
using Superpower.Model;
using static ChainSolve.Language.Parsing.Grammar;

namespace ChainSolve.Language.Parsing;

/// <summary>Expressions, ranges and texts, as the statements use them.</summary>
internal static class CommonGrammar
{
    public static readonly TokenListParser<TokenKind, ExpressionSyntax> Expression = ExpressionReader.Read;

    public static readonly TokenListParser<TokenKind, Token<TokenKind>> EqualSign = Symbol(TokenKind.Equal, "'='");

    public static readonly TokenListParser<TokenKind, ExpressionSyntax> Simple = ExpressionReader.ReadSimple;

    /// <summary><c>LO .. HI</c>; a bare low end takes the unit that ends the high end.</summary>
    public static readonly TokenListParser<TokenKind, RangeSyntax> Interval =
        from low in Expression
        from dots in Symbol(TokenKind.Range, "'..'")
        from high in Expression
        select RangeUnits.Share(low, high);

    public static readonly TokenListParser<TokenKind, string> QuotedText = input =>
    {
        var next = input.ConsumeToken();
        if (!next.HasValue || next.Value.Kind != TokenKind.Text)
        {
            return TokenListParserResult.Empty<TokenKind, string>(input, ["a text in quotes"]);
        }

        var text = next.Value.ToStringValue();
        var inner = text.Length > 1 && text[^1] == '"' ? text[1..^1] : text[1..];
        return TokenListParserResult.Value(Unescape(inner), input, next.Remainder);
    };

    private static string Unescape(string text)
    {
        var plain = new System.Text.StringBuilder(text.Length);
        for (var i = 0; i < text.Length; i++)
        {
            if (text[i] == '\\' && i + 1 < text.Length)
            {
                i++;
            }

            plain.Append(text[i]);
        }

        return plain.ToString();
    }
}
