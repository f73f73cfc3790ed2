using ChainSolve.Expressions;
using ChainSolve.Language.Syntax;

namespace ChainSolve.Binding;

/// <summary>Calls of built-in functions and of lets with parameters.</summary>
internal sealed partial class ExpressionBinder
{
    private static readonly string[] BuiltIns =
        ["min", "max", "abs", "floor", "ceil", "round", "exp", "ln", "sqrt", "choose", "count"];

    private BoundValue? BindCall(CallSyntax syntax, ExprScope scope)
    {
        var name = syntax.Function;
        if (!scope.NoNames && names.Find(name.Text) is LetSymbol { IsFunction: true } function)
        {
            return BindOwnFunction(function, syntax, scope);
        }

        switch (name.Text)
        {
            case "min" or "max":
                return BindExtreme(syntax, scope);
            case "abs":
                return One(syntax, scope, null) is { } value ? Apply(BuiltInFunction.Abs, value.Dimension, value) : null;
            case "sqrt":
                return BindRoot(syntax, scope);
            case "floor":
                return BindPlain(BuiltInFunction.Floor, syntax, scope);
            case "ceil":
                return BindPlain(BuiltInFunction.Ceil, syntax, scope);
            case "round":
                return BindPlain(BuiltInFunction.Round, syntax, scope);
            case "exp":
                return BindPlain(BuiltInFunction.Exp, syntax, scope);
            case "ln":
                return BindPlain(BuiltInFunction.Ln, syntax, scope);
            case "choose":
                return BindChoose(syntax, scope);
            case "count":
                return BindCount(syntax, scope);
            default:
                ReportNoFunction(name, scope);
                return null;
        }
    }

    private void ReportNoFunction(Identifier name, ExprScope scope)
    {
        if (scope.Locals?.ContainsKey(name.Text) == true)
        {
            context.Report(BindingFaults.WrongKind(name, "a local name", "it is not a function"));
        }
        else if (!scope.NoNames && names.Find(name.Text) is { } symbol)
        {
            context.Report(BindingFaults.WrongKind(name, symbol.Kind, "it is not a function"));
        }
        else
        {
            var own = names.All.OfType<LetSymbol>().Where(l => l.IsFunction).Select(l => l.Name.Text);
            context.Report(BindingFaults.UnknownFunction(name, BuiltIns.Concat(own)));
        }
    }

    private BoundValue? BindOwnFunction(LetSymbol function, CallSyntax syntax, ExprScope scope)
    {
        function.IsUsed = true;
        if (scope.GivensBelow is not null)
        {
            context.Report(BindingFaults.GivenNotAbove(syntax.Function, "is a function of this file"));
            return null;
        }

        var arguments = syntax.Arguments.Select(a => Bind(a, scope)).ToArray();
        var wanted = function.Syntax.Parameters!.Count;
        if (arguments.Length != wanted)
        {
            context.Report(BindingFaults.ArgumentCount(syntax.Function, Arguments(wanted), arguments.Length));
            return null;
        }

        return function.IsCyclic || arguments.Contains(null)
            ? null
            : Reaching(calls.Instantiate(function, syntax.Function, arguments!), syntax.Function, scope);
    }

    private Quantity? BindExtreme(CallSyntax syntax, ExprScope scope)
    {
        if (syntax.Arguments.Count == 0)
        {
            context.Report(BindingFaults.ArgumentCount(syntax.Function, "one argument or more", 0));
            return null;
        }

        var parts = new List<(Quantity Value, ExpressionSyntax Syntax)>();
        foreach (var argument in syntax.Arguments)
        {
            if (BindNumber(argument, scope, $"'{syntax.Function.Text}'") is { } value)
            {
                parts.Add((value, argument));
            }
        }

        if (parts.Count < syntax.Arguments.Count
            || rules.Unify(parts, $"the arguments of '{syntax.Function.Text}' have one dimension") is not { } dimension)
        {
            return null;
        }

        var which = syntax.Function.Text == "min" ? BuiltInFunction.Min : BuiltInFunction.Max;
        return Apply(which, dimension, [.. parts.Select(p => p.Value)]);
    }

    private Quantity? BindRoot(CallSyntax syntax, ExprScope scope)
    {
        if (One(syntax, scope, null) is not { } value)
        {
            return null;
        }

        if (value.Dimension.Power % 2 != 0)
        {
            context.Report(BindingFaults.RootOfOddPower(context.Source, syntax.Arguments[0].Span, value.Dimension));
            return null;
        }

        var dimension = value.Dimension with { Power = value.Dimension.Power / 2 };
        return Apply(BuiltInFunction.Sqrt, dimension, value);
    }

    private Quantity? BindPlain(BuiltInFunction function, CallSyntax syntax, ExprScope scope) =>
        One(syntax, scope, Dimension.Plain) is { } value ? Apply(function, Dimension.Plain, value) : null;

    private Quantity? BindChoose(CallSyntax syntax, ExprScope scope)
    {
        var arguments = syntax.Arguments
            .Select(a => BindQuantity(a, scope, Dimension.Plain, "'choose'"))
            .ToArray();
        if (arguments.Length != 2)
        {
            context.Report(BindingFaults.ArgumentCount(syntax.Function, Arguments(2), arguments.Length));
            return null;
        }

        return arguments.Contains(null) ? null : Apply(BuiltInFunction.Choose, Dimension.Plain, arguments!);
    }

    private Quantity? BindCount(CallSyntax syntax, ExprScope scope)
    {
        var conditions = syntax.Arguments.Select(a => BindCondition(a, scope, "'count'")).ToArray();
        if (conditions.Length == 0)
        {
            context.Report(BindingFaults.ArgumentCount(syntax.Function, "one condition or more", 0));
            return null;
        }

        return conditions.Contains(null)
            ? null
            : new Quantity(ExprNodes.Count([.. conditions.Select(c => c!.Expr)]), Dimension.Plain, conditions.Any(c => c!.ReadsState));
    }

    private Quantity? One(CallSyntax syntax, ExprScope scope, Dimension? dimension)
    {
        var place = $"'{syntax.Function.Text}'";
        var values = syntax.Arguments
            .Select(a => dimension is { } needed ? BindQuantity(a, scope, needed, place) : BindNumber(a, scope, place))
            .ToArray();
        if (values.Length == 1)
        {
            return values[0];
        }

        context.Report(BindingFaults.ArgumentCount(syntax.Function, Arguments(1), values.Length));
        return null;
    }

    private static Quantity Apply(BuiltInFunction function, Dimension dimension, params Quantity[] arguments) => new(
        ExprNodes.Function(function, [.. arguments.Select(a => a.Expr)]), dimension, arguments.Any(a => a.ReadsState));

    private static string Arguments(int count) =>
        count == 1 ? "1 argument" : FormattableString.Invariant($"{count} arguments");
}
