using ChainSolve.Language.Diagnostics;
using ChainSolve.Language.Lexing;
using ChainSolve.Language.Syntax;
using Superpower;
using Superpower.Model;
using static ChainSolve.Language.Parsing.CommonGrammar;
using static ChainSolve.Language.Parsing.EffectGrammar;
using static ChainSolve.Language.Parsing.Grammar;

namespace ChainSolve.Language.Parsing;

/// <summary>Items: heads, states, starts and moves.</summary>
internal static class ItemGrammar
{
    private static readonly string[] LaterDelays = ["erlang", "stages", "mixture", "fixed", "match", "weibull", "lognormal"];

    private static readonly TokenListParser<TokenKind, LocalSyntax> Local = Spanned<LocalSyntax>(
        from name in Name("the name of a local")
        from sign in EqualSign
        from value in Expression
        select new LocalSyntax { Span = default, Name = name, Value = value });

    private static readonly TokenListParser<TokenKind, IReadOnlyList<LocalSyntax>> Locals =
        from open in Symbol(TokenKind.OpenBracket, "'('")
        from locals in List(Local)
        from close in Symbol(TokenKind.CloseBracket, "')' or ','")
        select locals;

    private static readonly TokenListParser<TokenKind, ItemHeadSyntax> Head = Spanned<ItemHeadSyntax>(
        from name in Name("the name of an item")
        from count in After("x", Simple)
        from locals in Where(TokenKind.OpenBracket, Locals)
        select new ItemHeadSyntax { Span = default, Name = name, Count = count, Locals = locals ?? [] });

    private static readonly TokenListParser<TokenKind, ItemClauseSyntax> States =
        from word in Word("states")
        from states in List(Name("the name of a state"))
        select (ItemClauseSyntax)new StatesSyntax { Span = default, States = states };

    private static readonly TokenListParser<TokenKind, ItemClauseSyntax> Start =
        from word in Word("start")
        from shares in List(StateShare)
        select (ItemClauseSyntax)new StartSyntax { Span = default, Shares = shares };

    private static readonly TokenListParser<TokenKind, DelaySyntax> Delay = Spanned<DelaySyntax>(
        from kind in (TokenListParser<TokenKind, Token<TokenKind>>)DelayWord
        from mean in Expression
        select new DelaySyntax { Span = default, Mean = mean });

    // In parts, since the types of one long query nest so deep that they cannot be compiled ahead.
    private static readonly TokenListParser<TokenKind, Route> MoveRoute =
        from source in Name("the name of a state, 'states' or 'start'")
        from arrow in Symbol(TokenKind.Arrow, "'->'")
        from targets in List(StateShare)
        select new Route(source, targets);

    private static readonly TokenListParser<TokenKind, Pace> MovePace =
        from rate in After("at", Expression)
        from delay in rate is null ? After("after", Delay) : Skip<DelaySyntax>()
        from timed in rate is null && delay is null ? Missing("'at RATE' or 'after mean TIME'") : Present
        select new Pace(rate, delay);

    private static readonly TokenListParser<TokenKind, Service> MoveService =
        from crew in After("by", Name("the name of a crew"))
        from rank in crew is null ? Skip<ExpressionSyntax>() : After("rank", Expression)
        select new Service(crew, rank);

    private static readonly TokenListParser<TokenKind, ItemClauseSyntax> Move =
        from route in MoveRoute
        from pace in MovePace
        from when in After("when", Expression)
        from service in MoveService
        from name in After("named", Name("a name for the move"))
        from effects in Effects
        select (ItemClauseSyntax)new MoveSyntax
        {
            Span = default,
            From = route.From,
            Targets = route.Targets,
            Rate = pace.Rate,
            Delay = pace.Delay,
            When = when,
            Crew = service.Crew,
            Rank = service.Rank,
            Name = name,
            Effects = effects ?? [],
        };

    private static readonly TokenListParser<TokenKind, ItemClauseSyntax> Clause = Spanned<ItemClauseSyntax>(input =>
    {
        var first = input.ConsumeToken();
        var second = first.HasValue ? first.Remainder.ConsumeToken() : first;
        if (!second.HasValue || second.Value.Kind == TokenKind.Arrow)
        {
            return Move(input);
        }

        return first.Value.Is("states") ? States(input) : first.Value.Is("start") ? Start(input) : Misspelt(input, first.Value, second.Value);
    });

    public static readonly TokenListParser<TokenKind, StatementSyntax> Item =
        from word in Word("item")
        from heads in List(Head)
        from clauses in Block(Clause)
        select (StatementSyntax)new ItemSyntax { Span = default, Heads = heads, Clauses = clauses };

    private static TokenListParserResult<TokenKind, ItemClauseSyntax> Misspelt(
        TokenList<TokenKind> input, Token<TokenKind> first, Token<TokenKind> second) =>
        first.Kind == TokenKind.Name && second.Kind == TokenKind.Name && Suggestions.Nearest(first.Words(), ["states", "start"]) is { } nearest
            ? throw new SyntaxFaultException(TextCodes.Unexpected, first.Place(), $"'{first.Words()}' begins no clause of an item; nearest: '{nearest}'")
            : Move(input);

    private static TokenListParserResult<TokenKind, Token<TokenKind>> DelayWord(TokenList<TokenKind> input)
    {
        var next = input.ConsumeToken();
        if (next.HasValue && Array.Exists(LaterDelays, w => next.Value.Is(w)))
        {
            throw new SyntaxFaultException(
                TextCodes.NotRead, next.Value.Place(), $"the delay '{next.Value.Words()}' is not read by this version; write 'after mean TIME'");
        }

        return Word("mean")(input);
    }

    private static TokenListParser<TokenKind, T?> Skip<T>()
        where T : class => input => TokenListParserResult.Value<TokenKind, T?>(null, input, input);

    private static TokenListParser<TokenKind, bool> Missing(string what) => input => TokenListParserResult.Empty<TokenKind, bool>(input, [what]);

    private static TokenListParser<TokenKind, bool> Present => input => TokenListParserResult.Value(true, input, input);

    private sealed record Route(Identifier From, IReadOnlyList<StateShareSyntax> Targets);

    private sealed record Pace(ExpressionSyntax? Rate, DelaySyntax? Delay);

    private sealed record Service(Identifier? Crew, ExpressionSyntax? Rank);
}
