using ChainSolve.Language.Lexing;
using ChainSolve.Language.Syntax;
using Superpower;
using Superpower.Model;
using static ChainSolve.Language.Parsing.CommonGrammar;
using static ChainSolve.Language.Parsing.Grammar;

namespace ChainSolve.Language.Parsing;

/// <summary>Rewards.</summary>
internal static class RewardGrammar
{
    private static readonly TokenListParser<TokenKind, RewardTermSyntax> Rate =
        from word in Word("rate")
        from rate in Expression
        from condition in After("while", Expression)
        select (RewardTermSyntax)new RateTermSyntax { Span = default, Rate = rate, While = condition };

    private static readonly TokenListParser<TokenKind, RewardTermSyntax> Each =
        from word in Word("each")
        from source in Name("the name of an event, or ITEM.MOVE")
        from move in Where(TokenKind.Dot, Symbol(TokenKind.Dot, "'.'").IgnoreThen(Name("the name of a move")))
        from amount in (TokenListParser<TokenKind, ExpressionSyntax?>)Amount
        from condition in After("while", Expression)
        select (RewardTermSyntax)new EachTermSyntax { Span = default, Source = source, Move = move, Amount = amount, While = condition };

    private static readonly TokenListParser<TokenKind, RewardTermSyntax> Term = Spanned<RewardTermSyntax>(input =>
    {
        var next = input.ConsumeToken();
        return next.HasValue && next.Value.Is("each") ? Each(input)
            : next.HasValue && next.Value.Is("rate") ? Rate(input)
            : TokenListParserResult.Empty<TokenKind, RewardTermSyntax>(input, ["'rate' or 'each'"]);
    });

    private static readonly TokenListParser<TokenKind, IReadOnlyList<RewardTermSyntax>> Lone = Spanned<RewardTermSyntax>(
        from rate in Expression
        from condition in After("while", Expression)
        select (RewardTermSyntax)new RateTermSyntax { Span = default, Rate = rate, While = condition })
        .Select(term => (IReadOnlyList<RewardTermSyntax>)[term]);

    public static readonly TokenListParser<TokenKind, StatementSyntax> Reward =
        from word in Word("reward")
        from name in Name("the name of the reward")
        from unit in After("in", QuotedText)
        from lone in Where(TokenKind.Equal, EqualSign.IgnoreThen(Lone))
        from terms in lone is null ? Block(Term) : Given(lone)
        select (StatementSyntax)new RewardSyntax { Span = default, Name = name, Unit = unit, Terms = terms, IsShort = lone is not null };

    private static TokenListParser<TokenKind, T> Given<T>(T value) => input => TokenListParserResult.Value(value, input, input);

    private static TokenListParserResult<TokenKind, ExpressionSyntax?> Amount(TokenList<TokenKind> input)
    {
        var next = input.ConsumeToken();
        return !next.HasValue || next.Value.Kind is TokenKind.LineEnd or TokenKind.Semicolon or TokenKind.CloseBrace || next.Value.Is("while")
            ? TokenListParserResult.Value<TokenKind, ExpressionSyntax?>(null, input, input)
            : Expression(input).Widen();
    }
}
