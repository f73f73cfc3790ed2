using ChainSolve.Expressions;
using ChainSolve.Language.Syntax;
using ChainSolve.Modelling;

namespace ChainSolve.Binding;

/// <summary>Binds the inputs of a model.</summary>
internal sealed class GivenBinder(BindContext context, ExpressionBinder expressions)
{
    private readonly SpreadBinder spreads = new(context, expressions);

    /// <summary>The given, its symbol filled in; null after a fault.</summary>
    public BoundGiven? Bind(GivenSymbol symbol)
    {
        var syntax = symbol.Syntax;
        context.Sink.Enter(syntax);
        var scope = new ExprScope { GivensBelow = symbol.Index };
        var value = expressions.BindNumber(syntax.Value, scope, "a given");
        if (value is null)
        {
            return null;
        }

        var dimension = new Dimension(value.Dimension.Power);
        symbol.Value = new Quantity(new GivenExpr(symbol.Index), dimension, false);
        symbol.OutsideUnit = EndingUnit.Of(syntax.Value, dimension, context.TimeBase);
        var range = BindRange(syntax, dimension, scope);
        var spread = syntax.Spread is null ? null : spreads.Bind(syntax.Spread, dimension, scope);
        return (range is null) != (syntax.Range is null) || (spread is null) != (syntax.Spread is null)
            ? null
            : new BoundGiven
            {
                Name = symbol.Name.Text,
                Default = value.Expr,
                TimePower = dimension.Power,
                OutsideUnit = symbol.OutsideUnit,
                Range = range,
                Spread = spread,
                ShapesStates = false,
                Span = symbol.Name.Span,
            };
    }

    private (NumberExpr Low, NumberExpr High)? BindRange(GivenSyntax syntax, Dimension dimension, ExprScope scope)
    {
        if (syntax.Range is not { } range)
        {
            return null;
        }

        var low = expressions.BindQuantity(range.Low, scope, dimension, "the range of this given");
        var high = expressions.BindQuantity(range.High, scope, dimension, "the range of this given");
        return low is null || high is null ? null : (low.Expr, high.Expr);
    }
}
