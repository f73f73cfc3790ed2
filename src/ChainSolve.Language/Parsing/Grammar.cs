using ChainSolve.Language.Diagnostics;
using ChainSolve.Language.Lexing;
using ChainSolve.Language.Syntax;
using Superpower;
using Superpower.Model;
using TextSpan = ChainSolve.Language.Text.TextSpan;

namespace ChainSolve.Language.Parsing;

/// <summary>The pieces that all statements are made of. A parser chosen by its first token never backs out of it.</summary>
internal static class Grammar
{
    /// <summary>A token of a kind.</summary>
    public static TokenListParser<TokenKind, Token<TokenKind>> Symbol(TokenKind kind, string shown) => input =>
    {
        var next = input.ConsumeToken();
        return next.HasValue && next.Value.Kind == kind
            ? next
            : TokenListParserResult.Empty<TokenKind, Token<TokenKind>>(input, [shown]);
    };

    /// <summary>A word of the notation.</summary>
    public static TokenListParser<TokenKind, Token<TokenKind>> Word(string word) => input =>
    {
        var next = input.ConsumeToken();
        return next.HasValue && next.Value.Is(word)
            ? next
            : TokenListParserResult.Empty<TokenKind, Token<TokenKind>>(input, [$"'{word}'"]);
    };

    /// <summary>A name that is not reserved.</summary>
    public static TokenListParser<TokenKind, Identifier> Name(string what) => input =>
    {
        var next = input.ConsumeToken();
        if (!next.HasValue || next.Value.Kind != TokenKind.Name)
        {
            return TokenListParserResult.Empty<TokenKind, Identifier>(input, [what]);
        }

        var text = next.Value.Words();
        if (Words.Reserved.Contains(text))
        {
            throw new SyntaxFaultException(TextCodes.ReservedWord, next.Value.Place(), $"'{text}' is a word of the notation and cannot be a name; expected {what}");
        }

        return TokenListParserResult.Value(IdentifierOf(next.Value), input, next.Remainder);
    };

    public static Identifier IdentifierOf(Token<TokenKind> token) => new() { Span = token.Place(), Text = token.Words() };

    /// <summary>What follows a word, or null where the word does not come next.</summary>
    public static TokenListParser<TokenKind, T?> After<T>(string word, TokenListParser<TokenKind, T> parser)
        where T : class => input =>
    {
        var next = input.ConsumeToken();
        return next.HasValue && next.Value.Is(word)
            ? parser(next.Remainder).Widen()
            : TokenListParserResult.Value<TokenKind, T?>(null, input, input);
    };

    /// <summary>A parser that runs where a symbol comes next, the symbol included; null elsewhere.</summary>
    public static TokenListParser<TokenKind, T?> Where<T>(TokenKind kind, TokenListParser<TokenKind, T> parser)
        where T : class => input =>
    {
        var next = input.ConsumeToken();
        return next.HasValue && next.Value.Kind == kind
            ? parser(input).Widen()
            : TokenListParserResult.Value<TokenKind, T?>(null, input, input);
    };

    /// <summary>Whether a word comes next; it is taken then.</summary>
    public static TokenListParser<TokenKind, bool> Flag(string word) => input =>
    {
        var next = input.ConsumeToken();
        return next.HasValue && next.Value.Is(word)
            ? TokenListParserResult.Value(true, input, next.Remainder)
            : TokenListParserResult.Value(false, input, input);
    };

    /// <summary>One or more, with commas between.</summary>
    public static TokenListParser<TokenKind, IReadOnlyList<T>> List<T>(TokenListParser<TokenKind, T> parser) => input =>
    {
        var values = new List<T>();
        var rest = input;
        while (true)
        {
            var value = parser(rest);
            if (!value.HasValue)
            {
                return TokenListParserResult.CastEmpty<TokenKind, T, IReadOnlyList<T>>(value);
            }

            values.Add(value.Value);
            rest = value.Remainder;
            var comma = rest.ConsumeToken();
            if (!comma.HasValue || comma.Value.Kind != TokenKind.Comma)
            {
                return TokenListParserResult.Value<TokenKind, IReadOnlyList<T>>(values, input, rest);
            }

            rest = comma.Remainder;
        }
    };

    /// <summary>A value with the text it was read from.</summary>
    public static TokenListParser<TokenKind, T> Spanned<T>(TokenListParser<TokenKind, T> parser)
        where T : SyntaxNode => input =>
    {
        var result = parser(input);
        return result.HasValue
            ? TokenListParserResult.Value(result.Value with { Span = SpanBetween(input, result.Remainder) }, input, result.Remainder)
            : result;
    };

    /// <summary>The clauses between braces, ended by line ends, semicolons or the brace.</summary>
    public static TokenListParser<TokenKind, IReadOnlyList<T>> Block<T>(TokenListParser<TokenKind, T> clause) => input =>
    {
        var open = Symbol(TokenKind.OpenBrace, "'{'")(input);
        if (!open.HasValue)
        {
            return TokenListParserResult.CastEmpty<TokenKind, Token<TokenKind>, IReadOnlyList<T>>(open);
        }

        var clauses = new List<T>();
        var rest = open.Remainder;
        while (true)
        {
            var next = rest.ConsumeToken();
            if (!next.HasValue)
            {
                throw new SyntaxFaultException(TextCodes.Unclosed, open.Value.Place(), "this '{' is not closed; put a '}' behind its last clause");
            }

            if (next.Value.Kind is TokenKind.LineEnd or TokenKind.Semicolon)
            {
                rest = next.Remainder;
                continue;
            }

            if (next.Value.Kind == TokenKind.CloseBrace)
            {
                return TokenListParserResult.Value<TokenKind, IReadOnlyList<T>>(clauses, input, next.Remainder);
            }

            LineStarts.Check(next.Value);
            var value = clause(rest);
            if (!value.HasValue && IsStatement(next))
            {
                throw new SyntaxFaultException(TextCodes.Unclosed, open.Value.Place(), "this '{' is not closed before the next statement; put a '}' behind its last clause");
            }

            if (!value.HasValue)
            {
                return TokenListParserResult.CastEmpty<TokenKind, T, IReadOnlyList<T>>(value);
            }

            clauses.Add(value.Value);
            rest = value.Remainder;
            var end = rest.ConsumeToken();
            if (end.HasValue && end.Value.Kind is not (TokenKind.LineEnd or TokenKind.Semicolon or TokenKind.CloseBrace))
            {
                return TokenListParserResult.Empty<TokenKind, IReadOnlyList<T>>(rest, ["the end of the clause"]);
            }
        }
    };

    // Inside braces the words of statements are names like others, unless no clause can begin so.
    private static bool IsStatement(TokenListParserResult<TokenKind, Token<TokenKind>> first)
    {
        var second = first.Remainder.ConsumeToken();
        return first.Value.Kind == TokenKind.Name && Words.Statements.Contains(first.Value.Words())
            && second.HasValue && second.Value.Kind is TokenKind.Name or TokenKind.Text;
    }

    public static TokenListParserResult<TokenKind, T?> Widen<T>(this TokenListParserResult<TokenKind, T> result)
        where T : class => result.HasValue
            ? TokenListParserResult.Value<TokenKind, T?>(result.Value, result.Location, result.Remainder)
            : TokenListParserResult.CastEmpty<TokenKind, T, T?>(result);

    private static TextSpan SpanBetween(TokenList<TokenKind> from, TokenList<TokenKind> to)
    {
        var first = from.ConsumeToken();
        if (!first.HasValue)
        {
            return default;
        }

        var last = first.Value;
        for (var rest = first; rest.Remainder != to && !rest.Remainder.IsAtEnd;)
        {
            rest = rest.Remainder.ConsumeToken();
            last = rest.Value;
        }

        return TextSpan.Cover(first.Value.Place(), last.Place());
    }
}
