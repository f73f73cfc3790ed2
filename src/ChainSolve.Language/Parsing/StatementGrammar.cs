using ChainSolve.Language.Diagnostics;
using ChainSolve.Language.Lexing;
using ChainSolve.Language.Syntax;
using Superpower;
using Superpower.Model;
using static ChainSolve.Language.Parsing.CommonGrammar;
using static ChainSolve.Language.Parsing.EffectGrammar;
using static ChainSolve.Language.Parsing.Grammar;

namespace ChainSolve.Language.Parsing;

/// <summary>The statements, each chosen by its first word.</summary>
internal static class StatementGrammar
{
    private static readonly TokenListParser<TokenKind, StatementSyntax> Title =
        from word in Word("model")
        from title in QuotedText
        select (StatementSyntax)new TitleSyntax { Span = default, Title = title };

    private static readonly TokenListParser<TokenKind, StatementSyntax> Timebase =
        from word in Word("timebase")
        from unit in Name("a unit of time, such as 'h'")
        select (StatementSyntax)new TimebaseSyntax { Span = default, Unit = unit };

    private static readonly TokenListParser<TokenKind, CallSyntax> Spread =
        from call in Expression
        from checkedCall in call is CallSyntax ? Value((CallSyntax)call) : Expected<CallSyntax>("a distribution, such as 'uniform(LO, HI)'")
        select checkedCall;

    private static readonly TokenListParser<TokenKind, StatementSyntax> Given =
        from word in Word("given")
        from name in Name("the name of the given")
        from sign in EqualSign
        from value in Expression
        from range in After("in", Interval)
        from spread in After("spread", Spread)
        select (StatementSyntax)new GivenSyntax { Span = default, Name = name, Value = value, Range = range, Spread = spread };

    private static readonly TokenListParser<TokenKind, IReadOnlyList<Identifier>> Parameters =
        from open in Symbol(TokenKind.OpenBracket, "'('")
        from names in List(Name("the name of a parameter"))
        from close in Symbol(TokenKind.CloseBracket, "')' or ','")
        select names;

    private static readonly TokenListParser<TokenKind, StatementSyntax> Let =
        from word in Word("let")
        from name in Name("the name behind 'let'")
        from parameters in Where(TokenKind.OpenBracket, Parameters)
        from sign in EqualSign
        from value in Expression
        select (StatementSyntax)new LetSyntax { Span = default, Name = name, Parameters = parameters, Value = value };

    private static readonly TokenListParser<TokenKind, StatementSyntax> Crew =
        from word in Word("crew")
        from name in Name("the name of the crew")
        from sign in EqualSign
        from count in Expression
        from ranked in Flag("ranked")
        select (StatementSyntax)new CrewSyntax { Span = default, Name = name, Count = count, IsRanked = ranked };

    private static readonly TokenListParser<TokenKind, StatementSyntax> Counter =
        from word in Word("counter")
        from name in Name("the name of the counter")
        from range in Interval
        from start in After("start", Expression)
        select (StatementSyntax)new CounterSyntax { Span = default, Name = name, Range = range, Start = start };

    private static readonly TokenListParser<TokenKind, StatementSyntax> Event =
        from word in Word("event")
        from name in Name("the name of the event")
        from at in Word("at")
        from rate in Expression
        from when in After("when", Expression)
        from effects in Block(Effect)
        select (StatementSyntax)new EventSyntax { Span = default, Name = name, Rate = rate, When = when, Effects = effects };

    private static readonly Dictionary<string, TokenListParser<TokenKind, StatementSyntax>> ByWord = new()
    {
        ["model"] = Spanned(Title),
        ["timebase"] = Spanned(Timebase),
        ["given"] = Spanned(Given),
        ["let"] = Spanned(Let),
        ["crew"] = Spanned(Crew),
        ["item"] = Spanned(ItemGrammar.Item),
        ["counter"] = Spanned(Counter),
        ["event"] = Spanned(Event),
        ["reward"] = Spanned(RewardGrammar.Reward),
        ["measure"] = Spanned(MeasureGrammar.Measure),
    };

    public static readonly TokenListParser<TokenKind, StatementSyntax> Statement = input =>
    {
        var first = input.ConsumeToken().Value;
        LineStarts.Check(first);
        if (first.Kind == TokenKind.CloseBrace)
        {
            throw new SyntaxFaultException(TextCodes.Unclosed, first.Place(), "this '}' closes nothing; remove it, or open a '{' before it");
        }

        var word = first.Kind == TokenKind.Name ? first.Words() : "";
        if (ByWord.TryGetValue(word, out var parser))
        {
            return parser(input);
        }

        if (Words.LaterStatements.Contains(word))
        {
            throw new SyntaxFaultException(TextCodes.NotRead, first.Place(), $"the statement '{word}' is not read by this version");
        }

        var hint = Suggestions.Nearest(word, ByWord.Keys) is { } nearest ? $"nearest: '{nearest}'" : $"known: {string.Join(", ", ByWord.Keys)}";
        throw new SyntaxFaultException(TextCodes.UnknownStatement, first.Place(), $"'{first.Words()}' begins no statement; {hint}");
    };

    private static TokenListParser<TokenKind, T> Value<T>(T value) => input => TokenListParserResult.Value(value, input, input);

    private static TokenListParser<TokenKind, T> Expected<T>(string what) => input => TokenListParserResult.Empty<TokenKind, T>(input, [what]);
}
