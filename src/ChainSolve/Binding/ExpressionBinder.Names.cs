using ChainSolve.Expressions;
using ChainSolve.Language.Syntax;

namespace ChainSolve.Binding;

/// <summary>Names of quantities and states.</summary>
internal sealed partial class ExpressionBinder
{
    private BoundValue? BindName(NameSyntax syntax, ExprScope scope)
    {
        var name = syntax.Name;
        if (scope.NoNames)
        {
            context.Report(BindingFaults.NoNames(name));
            return null;
        }

        if (scope.Locals is { } locals && locals.TryGetValue(name.Text, out var local))
        {
            scope.UsedLocals?.Add(name.Text);
            return Reaching(local, name, scope);
        }

        if (names.Find(name.Text) is not { } symbol)
        {
            var known = names.Quantities.Concat(scope.Locals?.Keys ?? []).Concat(scope.AlsoMeant);
            context.Report(BindingFaults.UnknownName(name, known, () => names.MemberHint(name.Text)));
            return null;
        }

        symbol.IsUsed = true;
        if (scope.GivensBelow is { } limit && WhyNotAbove(symbol, limit) is { } why)
        {
            context.Report(BindingFaults.GivenNotAbove(name, why));
            return null;
        }

        switch (symbol)
        {
            case GivenSymbol given:
                return given.Value;
            case LetSymbol { IsFunction: false } let:
                return Reaching(let.Value, name, scope);
            case CounterSymbol counter:
                return Reaching(new Quantity(counter.Variable!, Dimension.Plain, true), name, scope);
            default:
                context.Report(BindingFaults.WrongKind(name, symbol.Kind, HowToUse(symbol)));
                return null;
        }
    }

    private Quantity? BindMember(MemberSyntax syntax, ExprScope scope) =>
        Place(syntax.Owner, syntax.Member, scope) is { } place
            ? Reaching(new Quantity(place.Item.Places[place.State], Dimension.Plain, true), syntax, scope) as Quantity
            : null;

    private Truth? BindIs(IsSyntax syntax, ExprScope scope)
    {
        if (Place(syntax.Owner, syntax.Member, scope) is not { } place)
        {
            return null;
        }

        if (place.Item.IsReplicated)
        {
            context.Report(BindingFaults.IsOnReplicas(syntax.Owner, syntax.Member.Text));
            return null;
        }

        var holds = ExprNodes.Compare(Comparison.Equal, place.Item.Places[place.State], ExprNodes.Number(1));
        return Reaching(new Truth(holds, true), syntax, scope) as Truth;
    }

    private (ItemSymbol Item, int State)? Place(Identifier owner, Identifier member, ExprScope scope)
    {
        if (scope.NoNames)
        {
            context.Report(BindingFaults.NoNames(owner));
            return null;
        }

        if (names.Find(owner.Text) is not { } symbol)
        {
            context.Report(BindingFaults.UnknownKind(owner, "item", names.NamesOf<ItemSymbol>()));
            return null;
        }

        symbol.IsUsed = true;
        if (symbol is not ItemSymbol item)
        {
            context.Report(BindingFaults.WrongKind(owner, symbol.Kind, "states belong to items"));
            return null;
        }

        if (item.StateIndex(member.Text) is >= 0 and var state)
        {
            return (item, state);
        }

        if (item.States.Count > 0)
        {
            context.Report(BindingFaults.UnknownState(member, item.Name.Text, item.States));
        }

        return null;
    }

    private BoundValue? Reaching(BoundValue? value, Identifier name, ExprScope scope) =>
        IsHidden(value, scope, name) ? null : value;

    private BoundValue? Reaching(BoundValue value, ExpressionSyntax syntax, ExprScope scope) =>
        IsHidden(value, scope, syntax) ? null : value;

    private bool IsHidden(BoundValue? value, ExprScope scope, SyntaxNode at)
    {
        if (value is not { ReadsState: true } || (scope.FixedPlace ?? (scope.GivensBelow is null ? null : "a given")) is not { } place)
        {
            return false;
        }

        context.Report(BindingFaults.ReadsState(context.Source, at.Span, place));
        return true;
    }

    private static string? WhyNotAbove(Symbol symbol, int limit) => symbol switch
    {
        GivenSymbol given when given.Index == limit => "is this given itself",
        GivenSymbol given => given.Index < limit ? null : "is declared below",
        _ => $"is {symbol.Kind}",
    };

    private static string HowToUse(Symbol symbol) => symbol switch
    {
        LetSymbol let => $"call it with its arguments: {let.Name.Text}({string.Join(", ", let.Syntax.Parameters!.Select(p => p.Text))})",
        ItemSymbol { States: [var state, ..] } item => $"how many of it are in a state is {item.Name.Text}.{state}",
        RewardSymbol => "a reward stands alone behind expected, average or total",
        _ => "a number or a condition is needed here",
    };
}
