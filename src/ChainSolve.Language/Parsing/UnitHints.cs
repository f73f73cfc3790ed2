using System.Collections.Frozen;
using ChainSolve.Language.Diagnostics;
using ChainSolve.Language.Lexing;
using ChainSolve.Language.Syntax;
using Superpower.Model;

namespace ChainSolve.Language.Parsing;

/// <summary>What a message adds where a word that could not be read may have been meant as a unit.</summary>
internal static class UnitHints
{
    private static readonly FrozenDictionary<string, string> Common = new Dictionary<string, string>
    {
        ["sec"] = "s",
        ["secs"] = "s",
        ["second"] = "s",
        ["seconds"] = "s",
        ["mins"] = "min",
        ["minute"] = "min",
        ["minutes"] = "min",
        ["m"] = "min",
        ["hr"] = "h",
        ["hrs"] = "h",
        ["hour"] = "h",
        ["hours"] = "h",
        ["H"] = "h",
        ["day"] = "d",
        ["days"] = "d",
        ["D"] = "d",
        ["w"] = "wk",
        ["week"] = "wk",
        ["weeks"] = "wk",
        ["month"] = "mo",
        ["months"] = "mo",
        ["yr"] = "y",
        ["yrs"] = "y",
        ["year"] = "y",
        ["years"] = "y",
        ["a"] = "y",
        ["fit"] = "FIT",
        ["percent"] = "%",
    }.ToFrozenDictionary();

    /// <summary>The hint for a token and the one before it, with a semicolon in front; empty where none fits.</summary>
    public static string For(Token<TokenKind> before, Token<TokenKind>? found)
    {
        if (found is not { Kind: TokenKind.Name or TokenKind.Percent } token)
        {
            return "";
        }

        var word = token.Words();
        if (UnitWords.Contains(word))
        {
            return before.Kind is TokenKind.CloseBracket or TokenKind.Name or TokenKind.Percent && !before.Is("per")
                ? $"; a unit stands only behind a number or a bracket, as in '(…) {word}'"
                : "";
        }

        if (before.Kind is not (TokenKind.Number or TokenKind.CloseBracket) && !before.Is("per"))
        {
            return "";
        }

        return (Common.GetValueOrDefault(word) ?? Suggestions.Nearest(word, UnitWords.All.Where(u => u.Length > 1))) is { } meant
            ? $"; nearest unit: '{meant}'"
            : "";
    }
}
