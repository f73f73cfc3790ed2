using ChainSolve.Language.Diagnostics;
using ChainSolve.Language.Lexing;
using ChainSolve.Language.Syntax;
using Superpower.Model;
using TextSpan = ChainSolve.Language.Text.TextSpan;

namespace ChainSolve.Language.Parsing;

/// <summary>What operators stand between: numbers with units, names, calls, states and brackets.</summary>
internal sealed partial class ExpressionReader
{
    private ExpressionSyntax? WithUnit()
    {
        var operand = Primary();
        if (operand is not (NumberSyntax or BracketSyntax) || Peek() is not { } next)
        {
            return operand;
        }

        if (next.Kind == TokenKind.Percent || (next.Kind == TokenKind.Name && UnitWords.Contains(next.Words())))
        {
            Take();
            return new UnitSyntax { Span = TextSpan.Cover(operand.Span, next.Place()), Operand = operand, Unit = Grammar.IdentifierOf(next) };
        }

        return operand;
    }

    private ExpressionSyntax? Primary()
    {
        if (Peek() is not { } token)
        {
            return null;
        }

        switch (token.Kind)
        {
            case TokenKind.Number:
                Take();
                return NumberOf(token);
            case TokenKind.OpenBracket:
                return Bracket();
            case TokenKind.Name when !Words.Reserved.Contains(token.Words()):
                return Named();
            case TokenKind.Name when token.Is("if"):
                throw new SyntaxFaultException(TextCodes.IfForm, token.Place(), "an 'if' inside an expression needs brackets around it: '(if … then … else …)'");
            default:
                return null;
        }
    }

    private BracketSyntax? Bracket()
    {
        var open = Take();
        Enter(open);
        if (Whole() is not { } inner)
        {
            return null;
        }

        var close = Close(open);
        depth--;
        return new BracketSyntax { Span = TextSpan.Cover(open.Place(), close.Place()), Inner = inner };
    }

    private ExpressionSyntax? Named()
    {
        var name = Take();
        if (NextIs(TokenKind.OpenBracket))
        {
            return Call(name);
        }

        if (NextIs(TokenKind.Dot))
        {
            Take();
            var member = Member(name, "the name of a state behind '.'");
            return new MemberSyntax { Span = TextSpan.Cover(name.Place(), member.Span), Owner = Grammar.IdentifierOf(name), Member = member };
        }

        if (!NextIs("is"))
        {
            return new NameSyntax { Span = name.Place(), Name = Grammar.IdentifierOf(name) };
        }

        Take();
        if (NextIs("not"))
        {
            var word = Take();
            var denied = Peek() is { Kind: TokenKind.Name } state ? state.Words() : "STATE";
            throw new SyntaxFaultException(TextCodes.IsForm, word.Place(), $"'is not' is not read; write 'not {name.Words()} is {denied}'");
        }

        var tested = Member(name, "the name of a state behind 'is'");
        return new IsSyntax { Span = TextSpan.Cover(name.Place(), tested.Span), Owner = Grammar.IdentifierOf(name), Member = tested };
    }

    private CallSyntax? Call(Token<TokenKind> name)
    {
        var open = Take();
        Enter(open);
        var arguments = new List<ExpressionSyntax>();
        if (!NextIs(TokenKind.CloseBracket))
        {
            while (true)
            {
                if (Whole() is not { } argument)
                {
                    return null;
                }

                arguments.Add(argument);
                if (!NextIs(TokenKind.Comma))
                {
                    break;
                }

                Take();
            }
        }

        var close = Close(open);
        depth--;
        return new CallSyntax { Span = TextSpan.Cover(name.Place(), close.Place()), Function = Grammar.IdentifierOf(name), Arguments = arguments };
    }

    private Identifier Member(Token<TokenKind> owner, string what)
    {
        if (Peek() is { Kind: TokenKind.Name } state && !Words.Reserved.Contains(state.Words()))
        {
            return Grammar.IdentifierOf(Take());
        }

        throw new SyntaxFaultException(TextCodes.Unexpected, Peek() is { } next ? next.Place() : owner.Place(), $"expected {what}");
    }

    private PerUnitSyntax PerUnit(Token<TokenKind> per)
    {
        NumberSyntax? count = null;
        if (NextIs(TokenKind.Number))
        {
            count = NumberOf(Take());
        }

        if (Peek() is { Kind: TokenKind.Name } unit && UnitWords.Contains(unit.Words()))
        {
            Take();
            if (NextIs(TokenKind.Caret))
            {
                throw new SyntaxFaultException(TextCodes.UnitForm, Peek()!.Value.Place(), "a power cannot stand behind a unit; bracket it: '(2 per h)^2'");
            }

            var name = Grammar.IdentifierOf(unit);
            return new PerUnitSyntax { Span = TextSpan.Cover(count?.Span ?? name.Span, name.Span), Count = count, Unit = name };
        }

        throw new SyntaxFaultException(
            TextCodes.UnitForm,
            Peek() is { } found ? found.Place() : per.Place(),
            $"expected a unit of time behind 'per', such as 'per h' or 'per 1000 h'{UnitHints.For(taken, Peek())}");
    }

    private Token<TokenKind> Close(Token<TokenKind> open)
    {
        if (NextIs(TokenKind.CloseBracket))
        {
            return Take();
        }

        if (Peek() is { } next && next.Kind is not (TokenKind.OpenBrace or TokenKind.CloseBrace or TokenKind.LineEnd))
        {
            throw new SyntaxFaultException(TextCodes.Unexpected, next.Place(), $"expected an operator or ')' before '{next.Words()}'{UnitHints.For(taken, Peek())}");
        }

        throw new SyntaxFaultException(TextCodes.Unclosed, open.Place(), "this '(' is not closed; put a ')' behind the expression");
    }

    private static NumberSyntax NumberOf(Token<TokenKind> token)
    {
        var text = token.ToStringValue();
        return new NumberSyntax { Span = token.Place(), Value = NumberScanner.ValueOf(text), Text = text };
    }
}
