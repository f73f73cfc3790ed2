using ChainSolve.Language.Diagnostics;
using ChainSolve.Language.Lexing;
using ChainSolve.Language.Syntax;
using Superpower;
using Superpower.Model;
using static ChainSolve.Language.Parsing.CommonGrammar;
using static ChainSolve.Language.Parsing.Grammar;

namespace ChainSolve.Language.Parsing;

/// <summary>Measures: what is computed, of what, and when.</summary>
internal static class MeasureGrammar
{
    private static readonly TokenListParser<TokenKind, Subject> Plain =
        from value in Expression
        select new Subject(value, null);

    private static readonly TokenListParser<TokenKind, Subject> Conditioned =
        from open in Symbol(TokenKind.OpenBracket, "'('")
        from value in Expression
        from word in Word("while")
        from condition in Expression
        from close in Symbol(TokenKind.CloseBracket, "')'")
        select new Subject(value, condition);

    private static readonly TokenListParser<TokenKind, Subject> SubjectOf = input => HasWhile(input) ? Conditioned(input) : Plain(input);

    private static readonly TokenListParser<TokenKind, TimeTermSyntax> TimeTerm = Spanned<TimeTermSyntax>(
        from first in Expression
        from high in Where(TokenKind.Range, Symbol(TokenKind.Range, "'..'").IgnoreThen(Expression))
        from term in high is null ? Lone(first) : Spaced(RangeUnits.Share(first, high))
        select term);

    public static readonly TokenListParser<TokenKind, IReadOnlyList<TimeTermSyntax>> Times = List(TimeTerm);

    public static readonly TokenListParser<TokenKind, StatementSyntax> Measure =
        from word in Word("measure")
        from name in Name("the name of the measure")
        from sign in EqualSign
        from form in (TokenListParser<TokenKind, MeasureForm>)FormOf
        from share in form.Kind == MeasureKind.QuantileTime ? Expression.Select(e => (ExpressionSyntax?)e) : None
        from linked in form.LinkWords.Count == 0 ? Done : Words(form.LinkWords)
        from subject in SubjectOf
        from scope in ScopeOf(form)
        select (StatementSyntax)new MeasureSyntax
        {
            Span = default,
            Name = name,
            Kind = form.Kind,
            Subject = subject.Value,
            While = subject.While,
            Share = share,
            Scope = scope.Scope,
            Times = scope.Times,
            Until = scope.Until,
        };

    private static TokenListParser<TokenKind, ExpressionSyntax?> None => input => TokenListParserResult.Value<TokenKind, ExpressionSyntax?>(null, input, input);

    private static TokenListParser<TokenKind, bool> Done => input => TokenListParserResult.Value(true, input, input);

    private static TokenListParser<TokenKind, bool> Words(IReadOnlyList<string> words) => input =>
    {
        var rest = input;
        foreach (var word in words)
        {
            var next = Word(word)(rest);
            if (!next.HasValue)
            {
                return TokenListParserResult.CastEmpty<TokenKind, Token<TokenKind>, bool>(next);
            }

            rest = next.Remainder;
        }

        return TokenListParserResult.Value(true, input, rest);
    };

    private static TokenListParser<TokenKind, TimeTermSyntax> Lone(ExpressionSyntax time) => input =>
        TokenListParserResult.Value<TokenKind, TimeTermSyntax>(new SingleTimeSyntax { Span = default, Time = time }, input, input);

    private static TokenListParser<TokenKind, TimeTermSyntax> Spaced(RangeSyntax range) => input =>
    {
        var next = input.ConsumeToken();
        var isStep = next.HasValue && next.Value.Is("step");
        if (!isStep && !(next.HasValue && next.Value.Is("log")))
        {
            return TokenListParserResult.Empty<TokenKind, TimeTermSyntax>(input, ["'step TIME' or 'log COUNT' behind the range"]);
        }

        var value = Expression(next.Remainder);
        return value.HasValue
            ? TokenListParserResult.Value<TokenKind, TimeTermSyntax>(
                isStep
                    ? new StepTimesSyntax { Span = default, Range = range, Step = value.Value }
                    : new LogTimesSyntax { Span = default, Range = range, Points = value.Value },
                input,
                value.Remainder)
            : TokenListParserResult.CastEmpty<TokenKind, ExpressionSyntax, TimeTermSyntax>(value);
    };

    private static TokenListParserResult<TokenKind, MeasureForm> FormOf(TokenList<TokenKind> input)
    {
        var first = input.ConsumeToken();
        if (!first.HasValue || first.Value.Kind != TokenKind.Name)
        {
            return TokenListParserResult.Empty<TokenKind, MeasureForm>(input, ["what to compute, such as 'probability' or 'total'"]);
        }

        var word = first.Value.Words();
        var second = first.Remainder.ConsumeToken();
        MeasureForm.RefuseLater(first.Value, second.HasValue ? second.Value : null);
        if (MeasureForm.Of(word, second.HasValue && second.Value.Is("spell")) is { } form)
        {
            return TokenListParserResult.Value(form, input, first.Remainder);
        }

        var hint = Suggestions.Nearest(word, MeasureForm.FirstWords) is { } nearest ? $"nearest: '{nearest}'" : $"known: {string.Join(", ", MeasureForm.FirstWords)}";
        throw new SyntaxFaultException(TextCodes.Unexpected, first.Value.Place(), $"'{word}' is nothing that can be computed; {hint}");
    }

    private static TokenListParser<TokenKind, ScopeAndTimes> ScopeOf(MeasureForm form) => input =>
    {
        var next = input.ConsumeToken();
        var word = next.HasValue ? next.Value.Words() : "";
        MeasureForm.RefuseLaterScope(next.HasValue ? next.Value : null);
        var scope = form.Scopes.FirstOrDefault(s => MeasureForm.WordOf(s) == word && word.Length > 0, MeasureScope.None);
        switch (scope)
        {
            case MeasureScope.At or MeasureScope.Over:
                var times = Times(next.Remainder);
                return times.HasValue
                    ? TokenListParserResult.Value(new ScopeAndTimes(scope, times.Value, null), input, times.Remainder)
                    : TokenListParserResult.CastEmpty<TokenKind, IReadOnlyList<TimeTermSyntax>, ScopeAndTimes>(times);
            case MeasureScope.Steady:
                return TokenListParserResult.Value(new ScopeAndTimes(scope, [], null), input, next.Remainder);
            case MeasureScope.Until:
                var until = Expression(next.Remainder);
                return until.HasValue
                    ? TokenListParserResult.Value(new ScopeAndTimes(scope, [], until.Value), input, until.Remainder)
                    : TokenListParserResult.CastEmpty<TokenKind, ExpressionSyntax, ScopeAndTimes>(until);
            default:
                return form.Scopes.Contains(MeasureScope.None)
                    ? TokenListParserResult.Value(new ScopeAndTimes(MeasureScope.None, [], null), input, input)
                    : TokenListParserResult.Empty<TokenKind, ScopeAndTimes>(input, [form.ScopesShown]);
        }
    };

    // A bracket that holds 'while' at its own depth is the subject '(EXPR while COND)'.
    private static bool HasWhile(TokenList<TokenKind> input)
    {
        var depth = 0;
        foreach (var token in input)
        {
            depth += token.Kind switch
            {
                TokenKind.OpenBracket => 1,
                TokenKind.CloseBracket => -1,
                _ => 0,
            };
            if (depth == 0)
            {
                return false;
            }

            if (depth == 1 && token.Is("while"))
            {
                return true;
            }
        }

        return false;
    }

    private sealed record Subject(ExpressionSyntax Value, ExpressionSyntax? While);

    private sealed record ScopeAndTimes(MeasureScope Scope, IReadOnlyList<TimeTermSyntax> Times, ExpressionSyntax? Until);
}
