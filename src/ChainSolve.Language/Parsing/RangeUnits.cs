using ChainSolve.Language.Diagnostics;
using ChainSolve.Language.Syntax;
using TextSpan = ChainSolve.Language.Text.TextSpan;

namespace ChainSolve.Language.Parsing;

/// <summary>The rule for units in a range: a low end that is a bare number takes the unit that ends the high end.</summary>
internal static class RangeUnits
{
    public static RangeSyntax Share(ExpressionSyntax low, ExpressionSyntax high)
    {
        var span = TextSpan.Cover(low.Span, high.Span);
        var unit = EndOf(high);
        if (unit is null && EndOf(low) is { } alone && IsBareNumber(high))
        {
            throw new SyntaxFaultException(TextCodes.UnitForm, alone.Span, "the unit of a range stands behind its high end; write it there, and behind the low end too if you like");
        }

        return new RangeSyntax { Span = span, Low = unit is not null && IsBareNumber(low) ? WithUnit(low, unit) : low, High = high };
    }

    private static bool IsBareNumber(ExpressionSyntax expression) => expression switch
    {
        NumberSyntax => true,
        UnarySyntax { Operator: UnaryOperator.Negate } negated => IsBareNumber(negated.Operand),
        _ => false,
    };

    /// <summary>The unit or the <c>per …</c> that ends an expression.</summary>
    private static ExpressionSyntax? EndOf(ExpressionSyntax expression)
    {
        while (true)
        {
            switch (expression)
            {
                case UnitSyntax or PerUnitSyntax:
                    return expression;
                case ChainSyntax chain:
                    expression = chain.Rest[^1].Operand;
                    break;
                case UnarySyntax unary:
                    expression = unary.Operand;
                    break;
                case BinarySyntax binary:
                    expression = binary.Right;
                    break;
                default:
                    return null;
            }
        }
    }

    private static ExpressionSyntax WithUnit(ExpressionSyntax low, ExpressionSyntax unit) => (low, unit) switch
    {
        (UnarySyntax negated, UnitSyntax) => negated with { Operand = WithUnit(negated.Operand, unit) },
        (_, UnitSyntax written) => new UnitSyntax { Span = low.Span, Operand = low, Unit = written.Unit },
        (_, _) => new ChainSyntax
        {
            Span = low.Span,
            First = low,
            Rest = [new ChainLink { Span = unit.Span, Operator = ChainOperator.Per, Operand = unit }],
        },
    };
}
