using System.Globalization;
using System.Text;
using ChainSolve.Language.Diagnostics;
using Superpower.Model;
using SourceText = ChainSolve.Language.Text.SourceText;
using TextSpan = ChainSolve.Language.Text.TextSpan;

namespace ChainSolve.Language.Lexing;

/// <summary>Cuts a text into tokens, one for every line end included, and collects comments and faults.</summary>
internal sealed class Lexer
{
    private readonly SourceText source;
    private readonly string text;
    private readonly List<Token<TokenKind>> tokens = [];
    private readonly List<TextSpan> comments = [];
    private readonly List<Diagnostic> faults = [];
    private int at;

    private Lexer(SourceText source)
    {
        this.source = source;
        text = source.Content;
    }

    public static LexedText Read(SourceText source)
    {
        var lexer = new Lexer(source);
        lexer.ReadAll();
        return new LexedText([.. lexer.tokens], lexer.comments, lexer.faults);
    }

    private void ReadAll()
    {
        while (at < text.Length)
        {
            var c = text[at];
            if (c == '\n')
            {
                Add(TokenKind.LineEnd, 1);
            }
            else if (c is ' ' or '\t' or '\r')
            {
                at++;
            }
            else if (c == '#')
            {
                ReadComment();
            }
            else if (char.IsAsciiDigit(c))
            {
                ReadNumber();
            }
            else if (c == '"')
            {
                ReadText();
            }
            else if (Rune.TryGetRuneAt(text, at, out var rune) && Rune.IsLetter(rune))
            {
                ReadName();
            }
            else
            {
                ReadSymbol(c);
            }
        }
    }

    private void Add(TokenKind kind, int length)
    {
        tokens.Add(new Token<TokenKind>(kind, new Superpower.Model.TextSpan(text, new Position(at, 1, 1), length)));
        at += length;
    }

    private void ReadComment()
    {
        var end = text.IndexOf('\n', at);
        end = end < 0 ? text.Length : end;
        var length = end - at;
        if (length > 0 && text[end - 1] == '\r')
        {
            length--;
        }

        comments.Add(new TextSpan(at, length));
        at = end;
    }

    private void ReadNumber()
    {
        var end = NumberScanner.EndOf(text, at);
        var number = text[at..end];
        if (end < text.Length && text[end] == '.' && !(end + 1 < text.Length && text[end + 1] == '.'))
        {
            Fault(TextCodes.NumberForm, at, end + 1 - at, $"a number needs digits on both sides of its dot; write '{number}.0' or '{number}'");
            Add(TokenKind.Number, end - at);
            at++;
            return;
        }

        if (end + 1 < text.Length && text[end] == ',' && char.IsAsciiDigit(text[end + 1]) && !number.Contains('.'))
        {
            var decimals = NumberScanner.EndOf(text, end + 1);
            var tail = text[(end + 1)..decimals];
            Fault(TextCodes.NumberForm, at, decimals - at, $"'{number},{tail}' is not a number here; write '{number}.{tail}' for a decimal, '{number}, {tail}' for a list");
            Add(TokenKind.Number, end - at);
            at = decimals;
            return;
        }

        if (double.IsInfinity(NumberScanner.ValueOf(number)))
        {
            Fault(TextCodes.NumberTooLarge, at, end - at, $"the number {number} is too large; the largest is about 1.8e308");
        }

        Add(TokenKind.Number, end - at);
    }

    private void ReadText()
    {
        var end = at + 1;
        while (end < text.Length && text[end] is not ('"' or '\n'))
        {
            if (text[end] == '\\')
            {
                if (end + 1 < text.Length && text[end + 1] is not ('"' or '\\' or '\n'))
                {
                    Fault(TextCodes.TextForm, end, 2, "an unknown escape in a text; write '\\\"' for a quote and '\\\\' for a backslash");
                }

                end++;
            }

            end++;
        }

        end = Math.Min(end, text.Length);
        if (end == text.Length || text[end] == '\n')
        {
            end = end > at + 1 && text[end - 1] == '\r' ? end - 1 : end;
            Fault(TextCodes.TextForm, at, 1, "this text is not closed on its line; put '\"' at its end");
            Add(TokenKind.Text, end - at);
            return;
        }

        Add(TokenKind.Text, end + 1 - at);
    }

    private void ReadName()
    {
        var end = at;
        while (Rune.TryGetRuneAt(text, end, out var rune) && IsNamePart(rune))
        {
            end += rune.Utf16SequenceLength;
            if (end >= text.Length)
            {
                break;
            }
        }

        Add(TokenKind.Name, end - at);
    }

    // Marks belong to names so that a letter and its combining accent read as the one letter they form.
    private static bool IsNamePart(Rune rune) =>
        rune.Value == '_' || Rune.IsLetterOrDigit(rune)
        || Rune.GetUnicodeCategory(rune) is UnicodeCategory.NonSpacingMark or UnicodeCategory.SpacingCombiningMark;

    private void ReadSymbol(char c)
    {
        var next = at + 1 < text.Length ? text[at + 1] : '\0';
        if (c == '.' && char.IsAsciiDigit(next) && !FollowsName())
        {
            var end = NumberScanner.EndOf(text, at + 1);
            Fault(TextCodes.NumberForm, at, end - at, $"a number needs digits on both sides of its dot; write '0{text[at..end]}'");
            at++;
            Add(TokenKind.Number, end - at);
            return;
        }

        var (kind, length) = (c, next) switch
        {
            ('.', '.') => (TokenKind.Range, 2),
            ('-', '>') => (TokenKind.Arrow, 2),
            ('!', '=') => (TokenKind.NotEqual, 2),
            ('<', '=') => (TokenKind.LessOrEqual, 2),
            ('>', '=') => (TokenKind.GreaterOrEqual, 2),
            ('.', _) => (TokenKind.Dot, 1),
            ('%', _) => (TokenKind.Percent, 1),
            ('(', _) => (TokenKind.OpenBracket, 1),
            (')', _) => (TokenKind.CloseBracket, 1),
            ('{', _) => (TokenKind.OpenBrace, 1),
            ('}', _) => (TokenKind.CloseBrace, 1),
            (';', _) => (TokenKind.Semicolon, 1),
            (',', _) => (TokenKind.Comma, 1),
            (':', _) => (TokenKind.Colon, 1),
            ('=', _) => (TokenKind.Equal, 1),
            ('<', _) => (TokenKind.Less, 1),
            ('>', _) => (TokenKind.Greater, 1),
            ('+', _) => (TokenKind.Plus, 1),
            ('-', _) => (TokenKind.Minus, 1),
            ('*', _) => (TokenKind.Star, 1),
            ('/', _) => (TokenKind.Slash, 1),
            ('^', _) => (TokenKind.Caret, 1),
            _ => (TokenKind.End, 0),
        };
        if (length > 0)
        {
            Add(kind, length);
            return;
        }

        StrayCharacter();
    }

    private bool FollowsName() => at > 0 && (char.IsLetterOrDigit(text[at - 1]) || text[at - 1] == '_');

    private void StrayCharacter()
    {
        var length = Rune.TryGetRuneAt(text, at, out var rune) ? rune.Utf16SequenceLength : 1;
        var shown = length > 0 && !Rune.IsControl(rune) && rune.Value > ' ' ? $"'{rune}'" : $"U+{(int)text[at]:X4}";
        Fault(TextCodes.StrayCharacter, at, length, $"the character {shown} has no meaning in a model; remove it or put it into a comment");
        at += length;
    }

    private void Fault(DiagnosticCode code, int start, int length, string message) =>
        faults.Add(new Diagnostic(code.Code, Severity.Fault, message, new TextSpan(start, length), source));
}
