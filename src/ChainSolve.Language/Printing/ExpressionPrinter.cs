using System.Text;
using ChainSolve.Language.Syntax;

namespace ChainSolve.Language.Printing;

/// <summary>Writes expressions in the canonical form: one blank around operators, brackets as they were written.</summary>
internal static class ExpressionPrinter
{
    public static string Print(ExpressionSyntax expression)
    {
        var text = new StringBuilder();
        Write(text, expression);
        return text.ToString();
    }

    public static void Write(StringBuilder text, ExpressionSyntax expression)
    {
        switch (expression)
        {
            case NumberSyntax number:
                text.Append(number.Text);
                break;
            case UnitSyntax unit:
                Write(text, unit.Operand);
                text.Append(' ').Append(unit.Unit.Text);
                break;
            case PerUnitSyntax per:
                text.Append(per.Count is { } count ? count.Text + " " : "").Append(per.Unit.Text);
                break;
            case NameSyntax name:
                text.Append(name.Name.Text);
                break;
            case CallSyntax call:
                text.Append(call.Function.Text).Append('(');
                WriteList(text, call.Arguments);
                text.Append(')');
                break;
            case MemberSyntax member:
                text.Append(member.Owner.Text).Append('.').Append(member.Member.Text);
                break;
            case IsSyntax test:
                text.Append(test.Owner.Text).Append(" is ").Append(test.Member.Text);
                break;
            case BracketSyntax bracket:
                text.Append('(');
                Write(text, bracket.Inner);
                text.Append(')');
                break;
            case UnarySyntax unary:
                text.Append(unary.Operator == UnaryOperator.Not ? "not " : "-");
                Write(text, unary.Operand);
                break;
            case BinarySyntax binary:
                Write(text, binary.Left);
                text.Append(SymbolOf(binary.Operator));
                Write(text, binary.Right);
                break;
            case ChainSyntax chain:
                WriteChain(text, chain);
                break;
            case ConditionalSyntax conditional:
                text.Append("if ");
                Write(text, conditional.Condition);
                text.Append(" then ");
                Write(text, conditional.WhenTrue);
                text.Append(" else ");
                Write(text, conditional.WhenFalse);
                break;
            default:
                throw new ArgumentException($"An expression of the type {expression.GetType().Name} has no printed form.", nameof(expression));
        }
    }

    private static void WriteChain(StringBuilder text, ChainSyntax chain)
    {
        Write(text, chain.First);
        foreach (var link in chain.Rest)
        {
            text.Append(SymbolOf(link.Operator));
            Write(text, link.Operand);
        }
    }

    private static void WriteList(StringBuilder text, IReadOnlyList<ExpressionSyntax> expressions)
    {
        for (var i = 0; i < expressions.Count; i++)
        {
            text.Append(i == 0 ? "" : ", ");
            Write(text, expressions[i]);
        }
    }

    private static string SymbolOf(BinaryOperator @operator) => @operator switch
    {
        BinaryOperator.Power => "^",
        BinaryOperator.Equal => " = ",
        BinaryOperator.NotEqual => " != ",
        BinaryOperator.Less => " < ",
        BinaryOperator.LessOrEqual => " <= ",
        BinaryOperator.Greater => " > ",
        _ => " >= ",
    };

    private static string SymbolOf(ChainOperator @operator) => @operator switch
    {
        ChainOperator.Or => " or ",
        ChainOperator.And => " and ",
        ChainOperator.Add => " + ",
        ChainOperator.Subtract => " - ",
        ChainOperator.Multiply => " * ",
        ChainOperator.Divide => "/",
        _ => " per ",
    };
}
