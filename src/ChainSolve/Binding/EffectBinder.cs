using ChainSolve.Language.Syntax;
using ChainSolve.Modelling;

namespace ChainSolve.Binding;

/// <summary>Binds what happens in an instant: new values of counters and moves of items.</summary>
internal sealed class EffectBinder(BindContext context, NameTable names, ExpressionBinder expressions)
{
    /// <summary>The lines in order; null after a fault.</summary>
    public IReadOnlyList<BoundEffect>? Bind(IReadOnlyList<EffectSyntax> lines, ExprScope scope)
    {
        var bound = new List<BoundEffect>();
        var assigned = new HashSet<string>(StringComparer.Ordinal);
        var emptied = new HashSet<int>();
        foreach (var line in lines)
        {
            context.Sink.EnterLine(line);
            BoundEffect? effect = line switch
            {
                AssignSyntax assign => BindAssign(assign, scope, assigned),
                ItemMoveSyntax move => BindMove(move, scope, emptied),
                _ => throw new ArgumentException($"Unknown effect {line.GetType().Name}.", nameof(lines)),
            };
            if (effect is not null)
            {
                bound.Add(effect);
            }
        }

        return bound.Count == lines.Count ? bound : null;
    }

    /// <summary>The targets of a move; null after a fault.</summary>
    public IReadOnlyList<MoveTarget>? BindTargets(ItemSymbol item, IReadOnlyList<StateShareSyntax> targets, ExprScope scope)
    {
        if (targets is [{ Share: { } unwanted } only])
        {
            context.Report(BindingFaults.TargetIsOnly(only.State, unwanted.Span));
            return null;
        }

        var bound = new List<MoveTarget>();
        foreach (var target in targets)
        {
            var state = StateOf(item, target.State);
            var share = target.Share is null
                ? null
                : expressions.BindQuantity(target.Share, scope, Dimension.Plain, $"the probability of '{target.State.Text}'");
            if (target.Share is null && targets.Count > 1)
            {
                context.Report(BindingFaults.TargetNeedsShare(target.State));
            }
            else if (state is { } to && (share is null) == (target.Share is null))
            {
                bound.Add(new MoveTarget(item.Places[to].Index, share?.Expr));
            }
        }

        return bound.Count == targets.Count ? bound : null;
    }

    /// <summary>The index of a state; null after a fault.</summary>
    public int? StateOf(ItemSymbol item, Identifier state)
    {
        if (item.StateIndex(state.Text) is >= 0 and var index)
        {
            return index;
        }

        context.Report(BindingFaults.UnknownState(state, item.Name.Text, item.States));
        return null;
    }

    private AssignEffect? BindAssign(AssignSyntax syntax, ExprScope scope, HashSet<string> assigned)
    {
        var counter = Find<CounterSymbol>(syntax.Counter, "counter", "only counters take values");
        var value = expressions.BindQuantity(syntax.Value, scope, Dimension.Plain, $"the new value of '{syntax.Counter.Text}'");
        if (counter is null || value is null)
        {
            return null;
        }

        if (!assigned.Add(counter.Name.Text))
        {
            context.Report(BindingFaults.AssignedTwice(syntax.Counter));
            return null;
        }

        return new AssignEffect { Variable = counter.Variable!.Index, Value = value.Expr, Span = syntax.Span };
    }

    private MoveEffect? BindMove(ItemMoveSyntax syntax, ExprScope scope, HashSet<int> emptied)
    {
        var count = syntax switch
        {
            { MovesAll: true } => null,
            { Count: null } => new Quantity(ExprNodes.Number(1), Dimension.Plain, false),
            { Count: { } written } => expressions.BindQuantity(written, scope, Dimension.Plain, "how many replicas move"),
        };
        if (Find<ItemSymbol>(syntax.Item, "item", "only items have states to move between") is not { } item || item.States.Count == 0)
        {
            return null;
        }

        var from = StateOf(item, syntax.From);
        var targets = BindTargets(item, syntax.Targets, scope);
        if (from is not { } left || targets is null || (count is null && !syntax.MovesAll))
        {
            return null;
        }

        var place = item.Places[left].Index;
        if (syntax.MovesAll && !emptied.Add(place))
        {
            context.Report(BindingFaults.AllTwice(syntax.From, syntax.Span));
            return null;
        }

        return new MoveEffect { From = place, Targets = targets, Count = count?.Expr, IfAny = syntax.IfAny, Span = syntax.Span };
    }

    private T? Find<T>(Identifier name, string wanted, string rule)
        where T : Symbol
    {
        switch (names.Find(name.Text))
        {
            case T symbol:
                symbol.IsUsed = true;
                return symbol;
            case null:
                context.Report(BindingFaults.UnknownKind(name, wanted, names.NamesOf<T>()));
                return null;
            case var other:
                context.Report(BindingFaults.WrongKind(name, other.Kind, rule));
                return null;
        }
    }
}
