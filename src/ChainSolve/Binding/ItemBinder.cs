using ChainSolve.Expressions;
using ChainSolve.Language.Syntax;
using ChainSolve.Modelling;

namespace ChainSolve.Binding;

/// <summary>Binds an item: its count, start, local names and moves. A body that several items share is bound once for each.</summary>
internal sealed class ItemBinder(BindContext context, NameTable names, ExpressionBinder expressions, EffectBinder effects)
{
    /// <summary>The item, with its moves filled into the symbol; null after a fault in count or start.</summary>
    public BoundItem? Bind(ItemSymbol item)
    {
        var prefix = item.SharesBody ? $"item '{item.Name.Text}': " : "";
        context.Sink.Enter(item.Head, prefix);
        item.Count = BindCount(item);
        var scope = BindLocals(item, out var used);
        var start = BindStart(item, scope, prefix);
        new MoveBinder(context, names, expressions, effects).Bind(item, scope, prefix);
        WarnOfLocals(item, used);
        return item.Count is null || start is null
            ? null
            : new BoundItem
            {
                Name = item.Name.Text,
                Count = item.Count.Expr,
                IsReplicated = item.IsReplicated,
                States = item.States,
                FirstVariable = item.FirstVariable,
                Start = start,
                StartIsDrawn = !item.IsReplicated && item.Syntax.Clauses.OfType<StartSyntax>().Any(c => c.Shares.Any(s => s.Share is not null)),
                Span = item.Name.Span,
            };
    }

    private Quantity? BindCount(ItemSymbol item)
    {
        if (item.Head.Count is not { } written)
        {
            return new Quantity(ExprNodes.Number(1), Dimension.Plain, false);
        }

        var place = $"the count of item '{item.Name.Text}'";
        return expressions.BindQuantity(written, ExprScope.Fixed(place), Dimension.Plain, place);
    }

    private ExprScope BindLocals(ItemSymbol item, out HashSet<string> used)
    {
        // A local may use those before it; its own name is then still the outer one.
        used = new HashSet<string>(StringComparer.Ordinal);
        var locals = new Dictionary<string, BoundValue?>(StringComparer.Ordinal);
        var scope = new ExprScope { Locals = locals, UsedLocals = used };
        foreach (var local in item.Head.Locals)
        {
            var value = expressions.Bind(local.Value, scope);
            if (!locals.TryAdd(local.Name.Text, value))
            {
                context.Report(BindingFaults.ParameterTwice(local.Name));
            }
        }

        return scope;
    }

    private void WarnOfLocals(ItemSymbol item, HashSet<string> used)
    {
        foreach (var local in item.Head.Locals.Where(l => !used.Contains(l.Name.Text)))
        {
            context.Sink.Warn(BindingFaults.Unused(local.Name, $"a local name of item '{item.Name.Text}'"));
        }
    }

    private NumberExpr[]? BindStart(ItemSymbol item, ExprScope scope, string prefix)
    {
        var clauses = item.Syntax.Clauses.OfType<StartSyntax>().ToList();
        foreach (var further in clauses.Skip(1))
        {
            context.Sink.Enter(further, prefix);
            context.Report(BindingFaults.StatementTwice("start", further.Span, context.Source.PositionOf(clauses[0].Span.Start).Line));
        }

        if (item.Count is null || item.States.Count == 0)
        {
            return null;
        }

        var start = new NumberExpr[item.States.Count];
        Array.Fill(start, ExprNodes.Number(0));
        if (clauses.Count == 0)
        {
            start[0] = item.Count.Expr;
            return start;
        }

        context.Sink.Enter(clauses[0], prefix);
        var isWhole = true;
        var seen = new HashSet<int>();
        foreach (var share in clauses[0].Shares)
        {
            if (BindShare(item, share, scope, clauses[0].Shares.Count == 1) is not { } bound)
            {
                isWhole = false;
            }
            else if (!seen.Add(bound.State))
            {
                context.Report(BindingFaults.StateTwice(share.State));
                isWhole = false;
            }
            else
            {
                start[bound.State] = bound.Value;
            }
        }

        return isWhole ? start : null;
    }

    private (int State, NumberExpr Value)? BindShare(ItemSymbol item, StateShareSyntax share, ExprScope scope, bool isOnly)
    {
        var state = effects.StateOf(item, share.State);
        if (share.Share is null)
        {
            if (!isOnly)
            {
                context.Report(item.IsReplicated ? BindingFaults.StartNeedsCounts(share.State) : BindingFaults.StartNeedsShares(share.State));
                return null;
            }

            return state is { } all ? (all, item.Count!.Expr) : null;
        }

        var place = $"the start of item '{item.Name.Text}'";
        var value = expressions.BindQuantity(share.Share, scope.AsFixed(place), Dimension.Plain, place);
        return state is { } one && value is not null ? (one, value.Expr) : null;
    }
}
