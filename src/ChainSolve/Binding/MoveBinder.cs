using ChainSolve.Expressions;
using ChainSolve.Language.Syntax;
using ChainSolve.Modelling;

namespace ChainSolve.Binding;

/// <summary>Binds the moves of an item, the share of a crew left open.</summary>
internal sealed class MoveBinder(BindContext context, NameTable names, ExpressionBinder expressions, EffectBinder effects)
{
    public void Bind(ItemSymbol item, ExprScope scope, string prefix)
    {
        var delayed = new HashSet<string>(StringComparer.Ordinal);
        foreach (var syntax in item.Syntax.Clauses.OfType<MoveSyntax>())
        {
            context.Sink.Enter(syntax, prefix);
            if (syntax.Delay is not null && !delayed.Add(syntax.From.Text))
            {
                context.Report(BindingFaults.AfterTwice(syntax.From, syntax.Delay.Span));
            }

            if (item.States.Count > 0 && BindMove(item, syntax, scope) is { } move)
            {
                item.Moves.Add(move);
            }
        }
    }

    private MoveDraft? BindMove(ItemSymbol item, MoveSyntax syntax, ExprScope scope)
    {
        var arrow = $"{syntax.From.Text} -> {string.Join(", ", syntax.Targets.Select(t => t.State.Text))}";
        var from = effects.StateOf(item, syntax.From);
        var targets = effects.BindTargets(item, syntax.Targets, scope);
        var rate = BindRate(syntax, scope, arrow);
        var when = syntax.When is null ? null : expressions.BindCondition(syntax.When, scope, "'when'");
        var service = BindService(syntax, scope);
        var further = effects.Bind(syntax.Effects, scope);
        if (from is not { } left || targets is null || rate is null || service is null || further is null
            || (when is null && syntax.When is not null))
        {
            return null;
        }

        return new MoveDraft
        {
            Item = item,
            Syntax = syntax,
            Label = $"move {arrow} of {item.Name.Text}",
            From = left,
            Rate = rate,
            When = when,
            Crew = service.Value.Crew,
            Rank = service.Value.Rank,
            Effects = Together(item.Places[left].Index, targets, further, syntax),
        };
    }

    private Quantity? BindRate(MoveSyntax syntax, ExprScope scope, string arrow)
    {
        if (syntax.Rate is { } rate)
        {
            return expressions.BindQuantity(rate, scope, Dimension.Rate, $"the rate of {arrow}");
        }

        return expressions.BindQuantity(syntax.Delay!.Mean, scope, Dimension.Time, $"the mean delay of {arrow}") is { } mean
            ? new Quantity(ExprNodes.Quotient(ExprNodes.Number(1), mean.Expr), Dimension.Rate, mean.ReadsState)
            : null;
    }

    private (CrewSymbol? Crew, double Rank)? BindService(MoveSyntax syntax, ExprScope scope)
    {
        if (syntax.Crew is not { } name)
        {
            if (syntax.Rank is null)
            {
                return (null, 0);
            }

            context.Report(BindingFaults.RankUnwanted(null, syntax.Rank.Span));
            return null;
        }

        if (names.Find(name.Text) is not { } symbol)
        {
            context.Report(BindingFaults.UnknownKind(name, "crew", names.NamesOf<CrewSymbol>()));
            return null;
        }

        symbol.IsUsed = true;
        if (symbol is not CrewSymbol crew)
        {
            context.Report(BindingFaults.WrongKind(name, symbol.Kind, "a move is served 'by' a crew"));
            return null;
        }

        return BindRank(syntax, crew, scope) is { } rank ? (crew, rank) : null;
    }

    private double? BindRank(MoveSyntax syntax, CrewSymbol crew, ExprScope scope)
    {
        if (syntax.Rank is null)
        {
            if (!crew.Syntax.IsRanked)
            {
                return 0;
            }

            context.Report(BindingFaults.RankMissing(syntax.Crew!));
            return null;
        }

        if (!crew.Syntax.IsRanked)
        {
            context.Report(BindingFaults.RankUnwanted(crew.Name, syntax.Rank.Span));
            return null;
        }

        var rank = expressions.BindQuantity(syntax.Rank, scope.AsFixed("a rank"), Dimension.Plain, "a rank");
        if (rank is null)
        {
            return null;
        }

        if (rank.Expr is ConstantExpr { Value: var value } && double.IsFinite(value))
        {
            return value;
        }

        context.Report(BindingFaults.RankNotFixed(context.Source, syntax.Rank.Span));
        return null;
    }

    // A move to the same state is an occurrence alone, unless other lines have to know which replica is busy with it.
    private static IReadOnlyList<BoundEffect> Together(
        int from, IReadOnlyList<MoveTarget> targets, IReadOnlyList<BoundEffect> further, MoveSyntax syntax)
    {
        if (further.Count == 0 && targets.All(t => t.To == from))
        {
            return [];
        }

        var own = new MoveEffect { From = from, Targets = targets, Count = ExprNodes.Number(1), IfAny = false, Span = syntax.Span };
        return [own, .. further];
    }
}
