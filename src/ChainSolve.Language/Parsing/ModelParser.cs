using ChainSolve.Language.Diagnostics;
using ChainSolve.Language.Lexing;
using ChainSolve.Language.Syntax;
using ChainSolve.Language.Text;
using Superpower;
using Superpower.Model;
using TextSpan = ChainSolve.Language.Text.TextSpan;

namespace ChainSolve.Language.Parsing;

/// <summary>Reads model texts.</summary>
/// <remarks>Safe to share between threads. Cost: linear in the length of the text.</remarks>
public static class ModelParser
{
    /// <summary>How many faults one run tells at most.</summary>
    public const int MostFaults = 20;

    /// <summary>Reads a model. Every statement that can be read is in the tree; every other one has a diagnostic.</summary>
    public static ParseResult Parse(SourceText source)
    {
        ArgumentNullException.ThrowIfNull(source);
        var lexed = Lexer.Read(source);
        var faults = new List<Diagnostic>(lexed.Faults);
        var statements = new List<StatementSyntax>();
        var unread = new HashSet<string>();
        foreach (var slice in StatementSlicer.Cut(lexed.Tokens))
        {
            if (faults.Count > 4 * MostFaults || HoldsFault(slice.Span, lexed.Faults))
            {
                unread.UnionWith(slice.Names);
                continue;
            }

            var (statement, fault) = Read(source, slice.Tokens, slice.Fault, StatementGrammar.Statement, "the end of the statement");
            if (statement is not null)
            {
                statements.Add(statement);
            }
            else
            {
                faults.Add(fault!);
                unread.UnionWith(slice.Names);
            }
        }

        var model = new ModelSyntax { Source = source, Statements = statements, Comments = lexed.Comments, UnreadNames = faults.Count > 0 ? unread : null };
        return new ParseResult(model, Limited(faults, source));
    }

    /// <summary>Reads a lone expression, such as a value set from outside; line ends in it do not count.</summary>
    public static ExpressionParse ParseExpression(SourceText source)
    {
        ArgumentNullException.ThrowIfNull(source);
        var lexed = Lexer.Read(source);
        if (lexed.Faults.Count > 0)
        {
            return new ExpressionParse(null, Limited(lexed.Faults, source));
        }

        var tokens = Array.FindAll(lexed.Tokens, t => t.Kind != TokenKind.LineEnd);
        if (tokens.Length == 0)
        {
            return new ExpressionParse(null, [FaultAt(source, TextCodes.Unexpected, new TextSpan(0, 0), "expected a number, a name or '('")]);
        }

        var (expression, fault) = Read(source, tokens, null, CommonGrammar.Expression, "the end of the value");
        return new ExpressionParse(expression, fault is null ? [] : [fault]);
    }

    private static (T? Value, Diagnostic? Fault) Read<T>(
        SourceText source, Token<TokenKind>[] tokens, (TextSpan Span, string Message)? outer, TokenListParser<TokenKind, T> parser, string end)
        where T : class
    {
        try
        {
            var result = parser(new TokenList<TokenKind>(tokens));
            if (outer is { } known && (result.HasValue || result.Remainder.IsAtEnd))
            {
                return (null, FaultAt(source, TextCodes.Unclosed, known.Span, known.Message));
            }

            if (!result.HasValue)
            {
                return (null, Expected(source, tokens, result.Remainder, string.Join(" or ", result.Expectations ?? [])));
            }

            return result.Remainder.IsAtEnd
                ? (result.Value, null)
                : (null, Expected(source, tokens, result.Remainder, end));
        }
        catch (SyntaxFaultException fault)
        {
            return (null, FaultAt(source, fault.Code, fault.Span, fault.Message));
        }
    }

    private static Diagnostic Expected(SourceText source, Token<TokenKind>[] tokens, TokenList<TokenKind> rest, string expected)
    {
        var next = rest.ConsumeToken();
        if (!next.HasValue)
        {
            return FaultAt(source, TextCodes.Unexpected, new TextSpan(tokens[^1].Place().End, 0), $"the line ends too early; expected {expected}");
        }

        var found = next.Value;
        var shown = found.Kind == TokenKind.LineEnd ? "the end of the line" : $"'{Short(found.Words())}'";
        return FaultAt(source, TextCodes.Unexpected, found.Place(), $"expected {expected} here, not {shown}{UnitHints.For(tokens[Math.Max(0, rest.Position - 1)], found)}");
    }

    private static string Short(string text) => text.Length <= 40 ? text : string.Concat(text.AsSpan(0, 37), "…");

    private static Diagnostic FaultAt(SourceText source, DiagnosticCode code, TextSpan span, string message) =>
        new(code.Code, Severity.Fault, message, span, source);

    private static bool HoldsFault(TextSpan span, IReadOnlyList<Diagnostic> faults)
    {
        // Faults of the lexer come in the order of the text.
        var (low, high) = (0, faults.Count);
        while (low < high)
        {
            var middle = (low + high) / 2;
            if (faults[middle].Span.Start < span.Start)
            {
                low = middle + 1;
            }
            else
            {
                high = middle;
            }
        }

        return low < faults.Count && faults[low].Span.Start <= span.End;
    }

    private static List<Diagnostic> Limited(IReadOnlyList<Diagnostic> faults, SourceText source)
    {
        var sorted = faults.OrderBy(f => f.Span.Start).ToList();
        if (sorted.Count > MostFaults)
        {
            var next = sorted[MostFaults];
            sorted.RemoveRange(MostFaults, sorted.Count - MostFaults);
            sorted.Add(FaultAt(source, TextCodes.TooMany, next.Span, $"there are more faults than the {MostFaults} above; mend these first"));
        }

        return sorted;
    }
}
