using ChainSolve.Language.Syntax;

namespace ChainSolve.Binding;

/// <summary>Which dimensions may stand together and where. In a file without units nothing is checked.</summary>
internal sealed class DimensionRules(BindContext context)
{
    private bool IsChecked => !context.TimeBase.IsUnitless;

    /// <summary>The dimension that all share; null after a fault.</summary>
    /// <param name="parts">Numbers with the expressions they come from; at least one.</param>
    /// <param name="action">What cannot be done with unlike ones: <c>these cannot be added</c>.</param>
    public Dimension? Unify(IReadOnlyList<(Quantity Value, ExpressionSyntax Syntax)> parts, string action)
    {
        var first = parts[0];
        foreach (var part in parts.Skip(1))
        {
            if (first.Value.Dimension.FitsAll)
            {
                first = part;
            }
            else if (IsChecked && !first.Value.Dimension.Fits(part.Value.Dimension))
            {
                ReportUnlike(first, part, action);
                return null;
            }
        }

        return first.Value.Dimension;
    }

    /// <summary>Whether a number has the dimension that its place needs; otherwise a fault.</summary>
    public bool Require(Quantity value, ExpressionSyntax syntax, Dimension needed, string place)
    {
        if (!IsChecked || value.Dimension.Fits(needed))
        {
            return true;
        }

        var mend = MissingUnit(value.Dimension, syntax, needed) ?? Turned(value.Dimension, syntax, needed);
        context.Report(BindingFaults.WrongDimension(
            place, needed, context.Quote(syntax.Span), value.Dimension, syntax.Span, mend));
        return false;
    }

    private void ReportUnlike(
        (Quantity Value, ExpressionSyntax Syntax) first, (Quantity Value, ExpressionSyntax Syntax) second, string action)
    {
        var mend = MissingBeside(second, first) ?? MissingBeside(first, second);
        var offender = first.Value.Dimension.IsPlain && !second.Value.Dimension.IsPlain ? first : second;
        context.Report(BindingFaults.UnlikeDimensions(
            action,
            context.Quote(first.Syntax.Span),
            first.Value.Dimension,
            context.Quote(second.Syntax.Span),
            second.Value.Dimension,
            offender.Syntax.Span,
            mend));
    }

    // What counts replicas or a counter is plain for good; the other side is wrong then.
    private string? MissingBeside((Quantity Value, ExpressionSyntax Syntax) bare, (Quantity Value, ExpressionSyntax Syntax) other) =>
        bare.Value.ReadsState ? null : MissingUnit(bare.Value.Dimension, bare.Syntax, other.Value.Dimension);

    private string? MissingUnit(Dimension found, ExpressionSyntax syntax, Dimension needed)
    {
        if (!found.IsPlain || needed.Power is not (1 or -1))
        {
            return null;
        }

        var unit = needed.Power == 1 ? context.TimeBase.Unit : $"per {context.TimeBase.Unit}";
        return syntax is NumberSyntax number
            ? $"write its unit, such as {number.Text} {unit}"
            : $"a unit such as '{unit}' is missing";
    }

    private string? Turned(Dimension found, ExpressionSyntax syntax, Dimension needed)
    {
        if (found.Power != -needed.Power)
        {
            return null;
        }

        var text = SourceWords.OneLine(context.Source.Slice(syntax.Span));
        return syntax is NameSyntax or BracketSyntax ? $"write 1/{text}" : $"write 1/({text})";
    }
}
