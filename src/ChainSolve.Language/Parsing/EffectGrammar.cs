using ChainSolve.Language.Lexing;
using ChainSolve.Language.Syntax;
using Superpower;
using Superpower.Model;
using static ChainSolve.Language.Parsing.CommonGrammar;
using static ChainSolve.Language.Parsing.Grammar;

namespace ChainSolve.Language.Parsing;

/// <summary>What happens in an instant, and the targets of moves.</summary>
internal static class EffectGrammar
{
    /// <summary><c>b</c>, <c>b P</c>: a state with the number behind it, if one is written.</summary>
    public static readonly TokenListParser<TokenKind, StateShareSyntax> StateShare = Spanned<StateShareSyntax>(
        from state in Name("the name of a state")
        from share in ShareUnlessOver
        select new StateShareSyntax { Span = default, State = state, Share = share });

    private static TokenListParser<TokenKind, ExpressionSyntax?> ShareUnlessOver => input =>
    {
        var next = input.ConsumeToken();
        return !next.HasValue || EndsShares(next.Value, next.Remainder)
            ? TokenListParserResult.Value<TokenKind, ExpressionSyntax?>(null, input, input)
            : Expression(input).Widen();
    };

    private static readonly TokenListParser<TokenKind, EffectSyntax> Assignment = Spanned<EffectSyntax>(
        from counter in Name("the name of a counter or item")
        from sign in EqualSign
        from value in Expression
        select (EffectSyntax)new AssignSyntax { Span = default, Counter = counter, Value = value });

    private static readonly TokenListParser<TokenKind, EffectSyntax> ItemMove = Spanned<EffectSyntax>(
        from item in Name("the name of a counter or item")
        from colon in Symbol(TokenKind.Colon, "':' or '='")
        from @from in Name("the name of a state")
        from arrow in Symbol(TokenKind.Arrow, "'->'")
        from targets in List(StateShare)
        from all in Flag("all")
        from count in all ? Nothing : After("x", Simple)
        from ifAny in After("if", Word("any").Select(IdentifierOf))
        select (EffectSyntax)new ItemMoveSyntax
        {
            Span = default,
            Item = item,
            From = @from,
            Targets = targets,
            Count = count,
            MovesAll = all,
            IfAny = ifAny is not null,
        });

    public static readonly TokenListParser<TokenKind, EffectSyntax> Effect = input =>
    {
        var name = input.ConsumeToken();
        var next = name.HasValue ? name.Remainder.ConsumeToken() : name;
        return next.HasValue && next.Value.Kind == TokenKind.Equal ? Assignment(input) : ItemMove(input);
    };

    public static readonly TokenListParser<TokenKind, IReadOnlyList<EffectSyntax>?> Effects = Where(TokenKind.OpenBrace, Block(Effect));

    private static TokenListParser<TokenKind, ExpressionSyntax?> Nothing => input =>
        TokenListParserResult.Value<TokenKind, ExpressionSyntax?>(null, input, input);

    // 'all', 'x 2' and 'if any' end the targets of an effect; each may also be the name of a state or a given.
    private static bool EndsShares(Token<TokenKind> token, TokenList<TokenKind> rest)
    {
        if (token.Kind is not (TokenKind.Number or TokenKind.Name or TokenKind.OpenBracket or TokenKind.Minus))
        {
            return true;
        }

        if (token.Kind != TokenKind.Name)
        {
            return false;
        }

        var next = rest.ConsumeToken();
        var isLast = !next.HasValue || next.Value.Kind is TokenKind.LineEnd or TokenKind.Semicolon or TokenKind.CloseBrace || next.Value.Is("if");
        return token.Words() switch
        {
            "at" or "after" or "if" => true,
            "all" => isLast,
            "x" => !isLast && next.Value.Kind is TokenKind.Number or TokenKind.Name or TokenKind.OpenBracket,
            _ => false,
        };
    }
}
