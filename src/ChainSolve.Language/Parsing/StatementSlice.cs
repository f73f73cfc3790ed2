using ChainSolve.Language.Lexing;
using Superpower.Model;
using TextSpan = ChainSolve.Language.Text.TextSpan;

namespace ChainSolve.Language.Parsing;

/// <summary>The tokens of one statement; line ends are left in only where they end a clause.</summary>
internal sealed class StatementSlice(Token<TokenKind>[] tokens, (TextSpan Span, string Message)? fault)
{
    public Token<TokenKind>[] Tokens { get; } = tokens;

    /// <summary>What is wrong with the braces, if anything.</summary>
    public (TextSpan Span, string Message)? Fault { get; } = fault;

    /// <summary>The names and words in it.</summary>
    public IEnumerable<string> Names => Tokens.Where(t => t.Kind == TokenKind.Name).Select(t => t.Words());

    public TextSpan Span => TextSpan.Cover(Tokens[0].Place(), Tokens[^1].Place());
}
