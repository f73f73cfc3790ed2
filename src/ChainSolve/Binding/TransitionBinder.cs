using ChainSolve.Language.Syntax;
using ChainSolve.Modelling;

namespace ChainSolve.Binding;

/// <summary>Binds events, gives moves their share of crews, and lists both in the order of the text.</summary>
internal sealed class TransitionBinder(BindContext context, NameTable names, ExpressionBinder expressions, EffectBinder effects)
{
    private readonly Dictionary<(ItemSymbol Item, string Move), List<Occurrence>> ofMove = [];
    private readonly List<BoundTransition> all = [];

    /// <summary>Everything that can happen.</summary>
    public IReadOnlyList<BoundTransition> All => all;

    /// <summary>The occurrences of the moves of a name.</summary>
    public IReadOnlyDictionary<(ItemSymbol Item, string Move), List<Occurrence>> OfMove => ofMove;

    public void BindAll(ModelSyntax model)
    {
        var shares = names.All.OfType<ItemSymbol>()
            .SelectMany(i => i.Moves)
            .Where(m => m.Crew?.Count is not null)
            .GroupBy(m => m.Crew!)
            .ToDictionary(g => g.Key, g => new CrewShares(g.Key, [.. g]));
        foreach (var statement in model.Statements)
        {
            switch (statement)
            {
                case ItemSyntax item:
                    foreach (var head in item.Heads)
                    {
                        AddMoves(head, shares);
                    }

                    break;
                case EventSyntax happening when names.Find(happening.Name.Text) is EventSymbol symbol && ReferenceEquals(symbol.Syntax, happening):
                    AddEvent(symbol);
                    break;
            }
        }
    }

    private void AddMoves(ItemHeadSyntax head, Dictionary<CrewSymbol, CrewShares> shares)
    {
        if (names.Find(head.Name.Text) is not ItemSymbol item || !ReferenceEquals(item.Head, head))
        {
            return;
        }

        foreach (var move in item.Moves)
        {
            var share = move.Crew is not null && shares.TryGetValue(move.Crew, out var crew) ? crew.ShareOf(move) : null;
            var transition = Transitions.Of(move, share);
            all.Add(transition);
            if (move.Syntax.Name is { } name)
            {
                var key = (item, name.Text);
                if (!ofMove.TryGetValue(key, out var occurrences))
                {
                    ofMove[key] = occurrences = [];
                }

                occurrences.Add(new Occurrence(transition.Guard, transition.Rate));
            }
        }
    }

    private void AddEvent(EventSymbol symbol)
    {
        var syntax = symbol.Syntax;
        context.Sink.Enter(syntax);
        var rate = expressions.BindQuantity(syntax.Rate, ExprScope.Top, Dimension.Rate, $"the rate of event '{symbol.Name.Text}'");
        var when = syntax.When is null ? null : expressions.BindCondition(syntax.When, ExprScope.Top, "'when'");
        var lines = effects.Bind(syntax.Effects, ExprScope.Top);
        if (rate is null || lines is null || (when is null) != (syntax.When is null))
        {
            return;
        }

        symbol.Occurrence = new Occurrence(when?.Expr, rate.Expr);
        all.Add(new BoundTransition
        {
            Label = $"event {symbol.Name.Text}",
            Guard = when?.Expr,
            Rate = rate.Expr,
            Effects = lines,
            Span = syntax.Span,
        });
    }
}
