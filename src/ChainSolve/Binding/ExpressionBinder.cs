using ChainSolve.Expressions;
using ChainSolve.Language.Syntax;

namespace ChainSolve.Binding;

/// <summary>Turns the syntax of expressions into typed expressions in the model's time base.</summary>
/// <remarks>
/// A null result means that a fault has been reported; it spreads without further faults. The depth of recursion is
/// that of the brackets, which the parser limits, times that of functions that call others, which nothing limits: so
/// every step goes through <see cref="StackGuard"/>. Lets are bound before what uses them.
/// </remarks>
internal sealed partial class ExpressionBinder
{
    private readonly BindContext context;
    private readonly NameTable names;
    private readonly DimensionRules rules;
    private readonly FunctionCalls calls;

    public ExpressionBinder(BindContext context, NameTable names)
    {
        this.context = context;
        this.names = names;
        rules = new DimensionRules(context);
        calls = new FunctionCalls(context, this);
    }

    /// <summary>A number of any dimension, or a condition.</summary>
    public BoundValue? Bind(ExpressionSyntax syntax, ExprScope scope) =>
        StackGuard.IsShort ? StackGuard.OnFreshStack(() => BindNode(syntax, scope)) : BindNode(syntax, scope);

    /// <summary>A number of any dimension.</summary>
    /// <param name="syntax">The expression.</param>
    /// <param name="scope">What it may refer to.</param>
    /// <param name="place">What needs it, for messages: <c>'+'</c>, <c>the rate of event 'order'</c>.</param>
    public Quantity? BindNumber(ExpressionSyntax syntax, ExprScope scope, string place)
    {
        var value = Bind(syntax, scope);
        if (value is Truth)
        {
            context.Report(BindingFaults.NotANumber(context.Source, syntax.Span, place));
        }

        return value as Quantity;
    }

    /// <summary>A number of one dimension.</summary>
    public Quantity? BindQuantity(ExpressionSyntax syntax, ExprScope scope, Dimension dimension, string place) =>
        BindNumber(syntax, scope, place) is { } value && rules.Require(value, syntax, dimension, place) ? value : null;

    /// <summary>A condition.</summary>
    public Truth? BindCondition(ExpressionSyntax syntax, ExprScope scope, string place)
    {
        var value = Bind(syntax, scope);
        if (value is Quantity)
        {
            context.Report(BindingFaults.NotACondition(context.Source, syntax.Span, place));
        }

        return value as Truth;
    }

    private BoundValue? BindNode(ExpressionSyntax syntax, ExprScope scope) => syntax switch
    {
        NumberSyntax number => new Quantity(ExprNodes.Number(number.Value), number.Value == 0 ? Dimension.Any : Dimension.Plain, false),
        UnitSyntax unit => BindUnit(unit, scope),
        BracketSyntax bracket => Bind(bracket.Inner, scope),
        NameSyntax name => BindName(name, scope),
        MemberSyntax member => BindMember(member, scope),
        IsSyntax isState => BindIs(isState, scope),
        UnarySyntax unary => BindUnary(unary, scope),
        BinarySyntax { Operator: BinaryOperator.Power } power => BindPower(power, scope),
        BinarySyntax comparison => BindComparison(comparison, scope),
        ChainSyntax chain => BindChain(chain, scope),
        ConditionalSyntax conditional => BindConditional(conditional, scope),
        CallSyntax call => BindCall(call, scope),
        _ => throw new ArgumentException($"An expression of the kind {syntax.GetType().Name} cannot stand alone.", nameof(syntax)),
    };

    private Quantity? BindUnit(UnitSyntax syntax, ExprScope scope)
    {
        if (UnitScale.Of(syntax.Unit.Text, context.TimeBase) is not { } scale)
        {
            context.Report(BindingFaults.UnknownUnit(syntax.Unit));
            return null;
        }

        if (BindNumber(syntax.Operand, scope, $"the unit '{syntax.Unit.Text}'") is not { } value)
        {
            return null;
        }

        if (scale.TimePower != 0 && value.Dimension.Power != 0)
        {
            context.Report(BindingFaults.UnitOnDimension(context.Source, syntax.Operand.Span, value.Dimension, syntax.Unit));
            return null;
        }

        var expr = ExprNodes.Scale(value.Expr, scale.Multiply, scale.Divide);
        return value with { Expr = expr, Dimension = new Dimension(value.Dimension.Power + scale.TimePower) };
    }

    private BoundValue? BindUnary(UnarySyntax syntax, ExprScope scope)
    {
        if (syntax.Operator == UnaryOperator.Not)
        {
            return BindCondition(syntax.Operand, scope, "'not'") is { } truth
                ? truth with { Expr = ExprNodes.Not(truth.Expr) }
                : null;
        }

        return BindNumber(syntax.Operand, scope, "'-'") is { } value
            ? value with { Expr = ExprNodes.Negate(value.Expr) }
            : null;
    }

    private Truth? BindComparison(BinarySyntax syntax, ExprScope scope)
    {
        var left = Compared(syntax.Left, scope);
        var right = Compared(syntax.Right, scope);
        if (left is null || right is null
            || rules.Unify([(left, syntax.Left), (right, syntax.Right)], "these cannot be compared") is null)
        {
            return null;
        }

        var comparison = syntax.Operator switch
        {
            BinaryOperator.Equal => Comparison.Equal,
            BinaryOperator.NotEqual => Comparison.NotEqual,
            BinaryOperator.Less => Comparison.Less,
            BinaryOperator.LessOrEqual => Comparison.LessOrEqual,
            BinaryOperator.Greater => Comparison.Greater,
            _ => Comparison.GreaterOrEqual,
        };
        return new Truth(ExprNodes.Compare(comparison, left.Expr, right.Expr), left.ReadsState || right.ReadsState);
    }

    private Quantity? Compared(ExpressionSyntax syntax, ExprScope scope)
    {
        var value = Bind(syntax, scope);
        if (value is Truth)
        {
            context.Report(BindingFaults.ComparedConditions(context.Source, syntax.Span));
        }

        return value as Quantity;
    }

    private BoundValue? BindConditional(ConditionalSyntax syntax, ExprScope scope)
    {
        var condition = BindCondition(syntax.Condition, scope, "'if'");
        var whenTrue = Bind(syntax.WhenTrue, scope);
        var whenFalse = Bind(syntax.WhenFalse, scope);
        if (condition is null || whenTrue is null || whenFalse is null)
        {
            return null;
        }

        var readsState = condition.ReadsState || whenTrue.ReadsState || whenFalse.ReadsState;
        switch (whenTrue, whenFalse)
        {
            case (Truth a, Truth b):
                return new Truth(ExprNodes.Choose(condition.Expr, a.Expr, b.Expr), readsState);
            case (Quantity a, Quantity b):
                var dimension = rules.Unify([(a, syntax.WhenTrue), (b, syntax.WhenFalse)], "both branches of an 'if' have one dimension");
                return dimension is null ? null : new Quantity(ExprNodes.Choose(condition.Expr, a.Expr, b.Expr), dimension.Value, readsState);
            default:
                context.Report(BindingFaults.BranchesDiffer(syntax.Span));
                return null;
        }
    }
}
