using System.Text;
using Superpower.Model;
using TextSpan = ChainSolve.Language.Text.TextSpan;

namespace ChainSolve.Language.Lexing;

/// <summary>Shorthands for tokens.</summary>
internal static class TokenExtensions
{
    public static TextSpan Place(this Token<TokenKind> token) => new(token.Span.Position.Absolute, token.Span.Length);

    /// <summary>The token's characters, a name in normal form C.</summary>
    public static string Words(this Token<TokenKind> token)
    {
        var text = token.ToStringValue();
        return token.Kind == TokenKind.Name && !IsAscii(text) ? Normal(text) : text;
    }

    public static bool Is(this Token<TokenKind> token, string word) =>
        token.Kind == TokenKind.Name && token.Span.Length == word.Length && token.Span.EqualsValue(word);

    private static bool IsAscii(string text) => text.All(char.IsAscii);

    private static string Normal(string text) => text.IsNormalized(NormalizationForm.FormC) ? text : text.Normalize(NormalizationForm.FormC);
}
