using ChainSolve.Language.Syntax;
using ChainSolve.Modelling;

namespace ChainSolve.Binding;

/// <summary>The unit that ends an expression: <c>h</c> of <c>9 h</c>, <c>per 1000 h</c> of <c>2 per 1000 h</c>; none of <c>1/20 h</c>.</summary>
internal static class EndingUnit
{
    /// <summary>The unit in which a bare number in place of an expression is read; null where there is no single one.</summary>
    public static OutsideUnit? Of(ExpressionSyntax syntax, Dimension dimension, TimeBase timeBase)
    {
        if (Find(syntax, timeBase) is { } found && found.Scale.TimePower == dimension.Power)
        {
            var scale = found.Scale;
            return new OutsideUnit(found.Text, scale.Multiply / scale.Divide) { Multiply = scale.Multiply, Divide = scale.Divide };
        }

        return dimension.Power == 0 && !HasPercent(syntax) ? OutsideUnit.None : null;
    }

    private static (string Text, UnitScale Scale)? Find(ExpressionSyntax syntax, TimeBase timeBase)
    {
        switch (syntax)
        {
            case UnitSyntax unit when UnitScale.Of(unit.Unit.Text, timeBase) is { } scale:
                return (unit.Unit.Text, scale);
            case BracketSyntax bracket:
                return Find(bracket.Inner, timeBase);
            case UnarySyntax { Operator: UnaryOperator.Negate } negative:
                return Find(negative.Operand, timeBase);
            case ChainSyntax chain:
                return FindInChain(chain, timeBase);
            default:
                return null;
        }
    }

    private static (string Text, UnitScale Scale)? FindInChain(ChainSyntax chain, TimeBase timeBase)
    {
        var last = chain.Rest[^1];
        switch (last.Operator)
        {
            case ChainOperator.Per when last.Operand is PerUnitSyntax per
                && UnitScale.Per(per.Count?.Value ?? 1, per.Unit.Text, timeBase) is { } scale:
                return (per.Count is { } count ? $"per {count.Text} {per.Unit.Text}" : $"per {per.Unit.Text}", scale);
            case ChainOperator.Multiply:
                return Find(last.Operand, timeBase);
            case ChainOperator.Add or ChainOperator.Subtract:
                var ends = chain.Rest.Select(link => Find(link.Operand, timeBase)).Prepend(Find(chain.First, timeBase)).ToList();
                return ends.TrueForAll(e => e?.Text == ends[0]?.Text) ? ends[0] : null;
            default:
                return null;
        }
    }

    // A bare number beside a share in percent could be meant either way.
    private static bool HasPercent(ExpressionSyntax syntax) => SyntaxParts.All(syntax).Any(s => s is UnitSyntax { Unit.Text: "%" });
}
