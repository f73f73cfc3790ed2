using ChainSolve.Expressions;
using ChainSolve.Language.Syntax;

namespace ChainSolve.Binding;

/// <summary>Sums, products, powers, and chains of conditions.</summary>
internal sealed partial class ExpressionBinder
{
    private const int LargestPower = 1000;

    private BoundValue? BindChain(ChainSyntax syntax, ExprScope scope) => syntax.Rest[0].Operator switch
    {
        ChainOperator.Or or ChainOperator.And => BindConditions(syntax, scope),
        ChainOperator.Add or ChainOperator.Subtract => BindSum(syntax, scope),
        _ => BindProduct(syntax, scope),
    };

    private Truth? BindConditions(ChainSyntax syntax, ExprScope scope)
    {
        var isAnd = syntax.Rest[0].Operator == ChainOperator.And;
        var place = isAnd ? "'and'" : "'or'";
        var operands = new List<ConditionExpr>(syntax.Rest.Count + 1);
        var readsState = false;
        ExpressionSyntax? before = null;
        foreach (var operand in syntax.Rest.Select(link => link.Operand).Prepend(syntax.First))
        {
            var test = before as IsSyntax;
            before = operand;
            if (test is not null && operand is NameSyntax lone && IsSecondState(test, lone, scope))
            {
                context.Report(BindingFaults.SecondState(test, lone.Name, isAnd ? "and" : "or"));
                continue;
            }

            if (BindCondition(operand, scope, place) is { } truth)
            {
                operands.Add(truth.Expr);
                readsState |= truth.ReadsState;
            }
        }

        return operands.Count <= syntax.Rest.Count
            ? null
            : new Truth(isAnd ? ExprNodes.All(operands) : ExprNodes.Any(operands), readsState);
    }

    // "P is a or b": the lone name is no condition of the model, but a state of the item.
    private bool IsSecondState(IsSyntax test, NameSyntax lone, ExprScope scope) =>
        scope.Locals?.ContainsKey(lone.Name.Text) != true
        && names.Find(lone.Name.Text) is null
        && names.Find(test.Owner.Text) is ItemSymbol item
        && item.StateIndex(lone.Name.Text) >= 0;

    private Quantity? BindSum(ChainSyntax syntax, ExprScope scope)
    {
        var parts = new List<(Quantity Value, ExpressionSyntax Syntax)>(syntax.Rest.Count + 1);
        var terms = new List<SumTerm>(syntax.Rest.Count + 1);
        Add(syntax.First, false);
        foreach (var link in syntax.Rest)
        {
            Add(link.Operand, link.Operator == ChainOperator.Subtract);
        }

        if (parts.Count <= syntax.Rest.Count || rules.Unify(parts, "these cannot be added or subtracted") is not { } dimension)
        {
            return null;
        }

        return new Quantity(ExprNodes.Sum(terms), dimension, parts.Any(p => p.Value.ReadsState));

        void Add(ExpressionSyntax operand, bool isSubtracted)
        {
            if (BindNumber(operand, scope, isSubtracted ? "'-'" : "'+'") is { } value)
            {
                parts.Add((value, operand));
                terms.Add(new SumTerm(value.Expr, isSubtracted));
            }
        }
    }

    private Quantity? BindProduct(ChainSyntax syntax, ExprScope scope)
    {
        var factors = new List<ProductFactor>(syntax.Rest.Count + 1);
        var power = 0;
        var readsState = false;
        var isWhole = Multiply(syntax.First, false);
        foreach (var link in syntax.Rest)
        {
            isWhole &= link.Operand is PerUnitSyntax per
                ? DividePer(per)
                : Multiply(link.Operand, link.Operator == ChainOperator.Divide);
        }

        if (!isWhole)
        {
            return null;
        }

        if (Math.Abs(power) > LargestPower)
        {
            context.Report(BindingFaults.PowerTooLarge(syntax.Span));
            return null;
        }

        return new Quantity(ExprNodes.Product(factors), new Dimension(power), readsState);

        bool Multiply(ExpressionSyntax operand, bool isDivided)
        {
            if (BindNumber(operand, scope, isDivided ? "'/'" : "'*'") is not { } value)
            {
                return false;
            }

            factors.Add(new ProductFactor(value.Expr, isDivided));
            power += isDivided ? -value.Dimension.Power : value.Dimension.Power;
            readsState |= value.ReadsState;
            return true;
        }

        bool DividePer(PerUnitSyntax per)
        {
            if (UnitScale.Per(per.Count?.Value ?? 1, per.Unit.Text, context.TimeBase) is not { TimePower: -1 } scale)
            {
                context.Report(BindingFaults.PerNeedsTime(per.Unit));
                return false;
            }

            factors.Add(new ProductFactor(ExprNodes.Number(scale.Multiply), false));
            factors.Add(new ProductFactor(ExprNodes.Number(scale.Divide), true));
            power--;
            return true;
        }
    }

    private Quantity? BindPower(BinarySyntax syntax, ExprScope scope)
    {
        var @base = BindNumber(syntax.Left, scope, "'^'");
        var exponent = BindQuantity(syntax.Right, scope, Dimension.Plain, "the exponent");
        if (@base is null || exponent is null)
        {
            return null;
        }

        var power = 0;
        if (@base.Dimension.Power != 0)
        {
            if (exponent.Expr is not ConstantExpr { Value: var times } || times != Math.Floor(times))
            {
                context.Report(BindingFaults.PowerNotWhole(context.Source, syntax.Left.Span, @base.Dimension));
                return null;
            }

            if (Math.Abs(times * @base.Dimension.Power) > LargestPower)
            {
                context.Report(BindingFaults.PowerTooLarge(syntax.Span));
                return null;
            }

            power = (int)times * @base.Dimension.Power;
        }

        return new Quantity(
            ExprNodes.Power(@base.Expr, exponent.Expr), new Dimension(power), @base.ReadsState || exponent.ReadsState);
    }
}
