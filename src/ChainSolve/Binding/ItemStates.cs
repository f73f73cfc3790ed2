using ChainSolve.Expressions;
using ChainSolve.Language.Syntax;

namespace ChainSolve.Binding;

/// <summary>Finds the states of items and numbers the places, before any expression is bound.</summary>
internal static class ItemStates
{
    /// <summary>Fills in states and places; gives the index of the first variable behind them.</summary>
    public static int Assign(NameTable names, BindContext context)
    {
        var next = 0;
        foreach (var item in names.All.OfType<ItemSymbol>())
        {
            Collect(item, context);
            item.FirstVariable = next;
            item.Places.AddRange(Enumerable.Range(next, item.States.Count).Select(index => new VariableExpr(index)));
            next += item.States.Count;
        }

        foreach (var counter in names.All.OfType<CounterSymbol>())
        {
            counter.Variable = new VariableExpr(next++);
        }

        return next;
    }

    private static void Collect(ItemSymbol item, BindContext context)
    {
        var lists = item.Syntax.Clauses.OfType<StatesSyntax>().ToList();
        foreach (var list in lists)
        {
            var isFirst = ReferenceEquals(list, lists[0]);
            context.Sink.Enter(list);
            if (!isFirst)
            {
                context.Report(BindingFaults.StatementTwice("states", list.Span, LineOf(lists[0], context)));
            }

            foreach (var state in list.States)
            {
                if (!item.AddState(state.Text) && isFirst)
                {
                    context.Report(BindingFaults.StateTwice(state));
                }
            }
        }

        if (lists.Count == 0)
        {
            // Order of appearance.
            foreach (var state in item.Syntax.Clauses.OfType<MoveSyntax>().SelectMany(m => m.Targets.Select(t => t.State).Prepend(m.From)))
            {
                item.AddState(state.Text);
            }
        }

        if (item.States.Count == 0)
        {
            context.Sink.Enter(item.Head);
            context.Report(BindingFaults.NoStates(item.Name));
        }
    }

    private static int LineOf(SyntaxNode node, BindContext context) => context.Source.PositionOf(node.Span.Start).Line;
}
