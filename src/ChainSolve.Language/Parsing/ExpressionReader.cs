using ChainSolve.Language.Diagnostics;
using ChainSolve.Language.Lexing;
using ChainSolve.Language.Syntax;
using Superpower.Model;
using TextSpan = ChainSolve.Language.Text.TextSpan;

namespace ChainSolve.Language.Parsing;

/// <summary>
/// Reads one expression by precedence climbing. It works on the stack of the caller, so nesting is limited; runs of operators of
/// one level are read in a loop and may be of any length.
/// </summary>
internal sealed partial class ExpressionReader(TokenList<TokenKind> tokens)
{
    /// <summary>How deep brackets, calls, powers, signs and conditionals may nest.</summary>
    public const int DeepestNesting = 128;

    private static readonly string[] Expected = ["a number, a name or '('"];

    private TokenList<TokenKind> rest = tokens;
    private Token<TokenKind> taken;
    private int depth;

    /// <summary>Reads as far as the expression goes; a result without a value says what was expected where.</summary>
    public static TokenListParserResult<TokenKind, ExpressionSyntax> Read(TokenList<TokenKind> tokens)
    {
        var reader = new ExpressionReader(tokens);
        var value = reader.Whole();
        return value is null
            ? TokenListParserResult.Empty<TokenKind, ExpressionSyntax>(reader.rest, Expected)
            : TokenListParserResult.Value(value, tokens, reader.rest);
    }

    /// <summary>Reads a number, a name or a bracket and no further, where a whole expression would run into what follows.</summary>
    public static TokenListParserResult<TokenKind, ExpressionSyntax> ReadSimple(TokenList<TokenKind> tokens)
    {
        var reader = new ExpressionReader(tokens);
        ExpressionSyntax? value = reader.Peek() switch
        {
            { Kind: TokenKind.Number } => NumberOf(reader.Take()),
            { Kind: TokenKind.OpenBracket } => reader.Bracket(),
            { Kind: TokenKind.Name } name when !Words.Reserved.Contains(name.Words()) =>
                new NameSyntax { Span = name.Place(), Name = Grammar.IdentifierOf(reader.Take()) },
            _ => null,
        };
        return value is null
            ? TokenListParserResult.Empty<TokenKind, ExpressionSyntax>(reader.rest, Expected)
            : TokenListParserResult.Value(value, tokens, reader.rest);
    }

    private ExpressionSyntax? Whole() => NextIs("if") ? Conditional() : Chain(Level.Or);

    private ConditionalSyntax? Conditional()
    {
        var start = Take();
        Enter(start);
        if (Chain(Level.Or) is not { } condition || !TakeWord("then"))
        {
            return null;
        }

        if (Whole() is not { } whenTrue || !TakeWord("else") || Whole() is not { } whenFalse)
        {
            return null;
        }

        depth--;
        return new ConditionalSyntax
        {
            Span = TextSpan.Cover(start.Place(), whenFalse.Span),
            Condition = condition,
            WhenTrue = whenTrue,
            WhenFalse = whenFalse,
        };
    }

    private bool TakeWord(string word)
    {
        if (NextIs(word))
        {
            Take();
            return true;
        }

        throw new SyntaxFaultException(
            TextCodes.Unexpected, Peek() is { } next ? next.Place() : new TextSpan(taken.Place().End, 0), $"expected '{word}' here; an 'if' is written 'if CONDITION then A else B'");
    }

    private ExpressionSyntax? Chain(Level level)
    {
        if (Operand(level) is not { } first)
        {
            return null;
        }

        List<ChainLink>? links = null;
        while (Peek() is { } token && Operators.ChainOperatorOf(token, level) is { } chainOperator)
        {
            Take();
            var operand = chainOperator == ChainOperator.Per ? PerUnit(token) : Operand(level);
            if (operand is null)
            {
                return null;
            }

            (links ??= []).Add(new ChainLink { Span = TextSpan.Cover(token.Place(), operand.Span), Operator = chainOperator, Operand = operand });
        }

        return links is null ? first : new ChainSyntax { Span = TextSpan.Cover(first.Span, links[^1].Span), First = first, Rest = links };
    }

    private ExpressionSyntax? Operand(Level level) => level switch
    {
        Level.Or => Chain(Level.And),
        Level.And => Negation(),
        Level.Sum => Chain(Level.Product),
        _ => Signed(),
    };

    private ExpressionSyntax? Negation()
    {
        if (!NextIs("not"))
        {
            return Comparison();
        }

        var word = Take();
        Enter(word);
        if (Negation() is not { } operand)
        {
            return null;
        }

        depth--;
        return new UnarySyntax { Span = TextSpan.Cover(word.Place(), operand.Span), Operator = UnaryOperator.Not, Operand = operand };
    }

    private ExpressionSyntax? Comparison()
    {
        if (Chain(Level.Sum) is not { } left)
        {
            return null;
        }

        if (Peek() is not { } token || Operators.ComparisonOf(token.Kind) is not { } comparison)
        {
            return left;
        }

        Take();
        if (Chain(Level.Sum) is not { } right)
        {
            return null;
        }

        if (Peek() is { } again && Operators.ComparisonOf(again.Kind) is not null)
        {
            throw new SyntaxFaultException(TextCodes.ChainedComparison, again.Place(), "comparisons do not chain; write 'a < b and b < c'");
        }

        return new BinarySyntax { Span = TextSpan.Cover(left.Span, right.Span), Operator = comparison, Left = left, Right = right };
    }

    private ExpressionSyntax? Signed()
    {
        if (!NextIs(TokenKind.Minus))
        {
            return Power();
        }

        var sign = Take();
        Enter(sign);
        if (Signed() is not { } operand)
        {
            return null;
        }

        depth--;
        return new UnarySyntax { Span = TextSpan.Cover(sign.Place(), operand.Span), Operator = UnaryOperator.Negate, Operand = operand };
    }

    private ExpressionSyntax? Power()
    {
        if (WithUnit() is not { } @base)
        {
            return null;
        }

        if (!NextIs(TokenKind.Caret))
        {
            return @base;
        }

        var caret = Take();
        if (@base is UnitSyntax)
        {
            throw new SyntaxFaultException(TextCodes.UnitForm, caret.Place(), "a power cannot stand behind a unit; bracket it: '(9 h)^2'");
        }

        Enter(caret);
        if (Signed() is not { } exponent)
        {
            return null;
        }

        depth--;
        return new BinarySyntax { Span = TextSpan.Cover(@base.Span, exponent.Span), Operator = BinaryOperator.Power, Left = @base, Right = exponent };
    }

    private void Enter(Token<TokenKind> token)
    {
        if (++depth > DeepestNesting)
        {
            throw new SyntaxFaultException(TextCodes.TooDeep, token.Place(), $"brackets, signs, powers and 'if's nest deeper than {DeepestNesting}; name a part of the expression with 'let'");
        }
    }

    private Token<TokenKind>? Peek()
    {
        var next = rest.ConsumeToken();
        return next.HasValue ? next.Value : null;
    }

    private bool NextIs(TokenKind kind) => Peek() is { } token && token.Kind == kind;

    private bool NextIs(string word) => Peek() is { } token && token.Is(word);

    private Token<TokenKind> Take()
    {
        var next = rest.ConsumeToken();
        rest = next.Remainder;
        return taken = next.Value;
    }
}
