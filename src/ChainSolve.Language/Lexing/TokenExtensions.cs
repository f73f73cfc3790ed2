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
        return token.Kind == TokenKind.Name ? NormalForm.Of(text) : text;
    }

    public static bool Is(this Token<TokenKind> token, string word) =>
        token.Kind == TokenKind.Name && token.Span.Length == word.Length && token.Span.EqualsValue(word);
}
