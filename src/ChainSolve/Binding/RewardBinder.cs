using ChainSolve.Expressions;
using ChainSolve.Language.Syntax;
using ChainSolve.Modelling;

namespace ChainSolve.Binding;

/// <summary>Binds rewards: what is earned in time and at occurrences, as one mean rate of earning.</summary>
internal sealed class RewardBinder(
    BindContext context,
    NameTable names,
    ExpressionBinder expressions,
    IReadOnlyDictionary<(ItemSymbol Item, string Move), List<Occurrence>> moves)
{
    /// <summary>The reward; null after a fault.</summary>
    public Earning? Bind(RewardSyntax syntax)
    {
        context.Sink.Enter(syntax);
        if (syntax.Terms.Count == 0)
        {
            context.Report(BindingFaults.RewardEmpty(syntax.Name));
            return null;
        }

        var terms = new List<SumTerm>();
        (Dimension Total, RewardTermSyntax Term)? first = null;
        foreach (var term in syntax.Terms)
        {
            context.Sink.Enter(syntax.IsShort ? syntax : term);
            if (BindTerm(term) is not { } bound)
            {
                continue;
            }

            terms.Add(new SumTerm(bound.Rate, false));
            if (bound.Total.FitsAll || first is not { } before)
            {
                first ??= bound.Total.FitsAll ? null : (bound.Total, term);
            }
            else if (!context.TimeBase.IsUnitless && !before.Total.Fits(bound.Total))
            {
                context.Report(BindingFaults.RewardDimension(context.Source, term.Span, bound.Total, before.Term.Span, before.Total));
            }
        }

        if (terms.Count < syntax.Terms.Count)
        {
            return null;
        }

        // Without units a rate is a plain number per unit of time, whatever that is.
        var power = context.TimeBase.IsUnitless ? 0 : (first?.Total.Power ?? 1) - 1;
        return new Earning(ExprNodes.Sum(terms), power, syntax.Unit);
    }

    private (NumberExpr Rate, Dimension Total)? BindTerm(RewardTermSyntax term)
    {
        var condition = term.While is null ? null : expressions.BindCondition(term.While, ExprScope.Top, "'while'");
        var bound = term switch
        {
            RateTermSyntax rate => BindRate(rate, condition),
            EachTermSyntax each => BindEach(each, condition),
            _ => throw new ArgumentException($"Unknown term {term.GetType().Name}.", nameof(term)),
        };
        return condition is null && term.While is not null ? null : bound;
    }

    private (NumberExpr Rate, Dimension Total)? BindRate(RateTermSyntax term, Truth? condition)
    {
        if (expressions.BindNumber(term.Rate, ExprScope.Top, "what is earned") is not { } rate)
        {
            return null;
        }

        var total = rate.Dimension.FitsAll ? Dimension.Any : new Dimension(rate.Dimension.Power + 1);
        return (While(condition?.Expr, rate.Expr), total);
    }

    private (NumberExpr Rate, Dimension Total)? BindEach(EachTermSyntax term, Truth? condition)
    {
        var amount = term.Amount is null
            ? new Quantity(ExprNodes.Number(1), Dimension.Plain, false)
            : expressions.BindNumber(term.Amount, ExprScope.Top, "what is earned each time");
        if (Sources(term) is not { } sources || amount is null)
        {
            return null;
        }

        var terms = sources.Select(s => new SumTerm(AtOccurrences(s, amount, condition), false));
        return (ExprNodes.Sum([.. terms]), amount.Dimension);
    }

    // The amount and the condition are read at an occurrence, so nowhere where there can be none.
    private static NumberExpr AtOccurrences(Occurrence source, Quantity amount, Truth? condition)
    {
        var conditions = new List<ConditionExpr>();
        if (source.Guard is { } guard)
        {
            conditions.Add(guard);
        }

        if (amount.ReadsState || condition is { ReadsState: true })
        {
            conditions.Add(ExprNodes.Compare(Comparison.Greater, source.Rate, ExprNodes.Number(0)));
        }

        if (condition is not null)
        {
            conditions.Add(condition.Expr);
        }

        var earned = ExprNodes.Product([new ProductFactor(source.Rate, false), new ProductFactor(amount.Expr, false)]);
        return conditions.Count == 0 ? earned : While(ExprNodes.All(conditions), earned);
    }

    private static NumberExpr While(ConditionExpr? condition, NumberExpr rate) =>
        condition is null ? rate : ExprNodes.Choose(condition, rate, ExprNodes.Number(0));

    private List<Occurrence>? Sources(EachTermSyntax term)
    {
        var name = term.Source;
        var symbol = names.Find(name.Text);
        if (symbol is not null)
        {
            symbol.IsUsed = true;
        }

        switch (symbol, term.Move)
        {
            case (EventSymbol happening, null):
                return happening.Occurrence is { } occurrence ? [occurrence] : null;
            case (ItemSymbol item, { } move):
                return SourcesOf(item, move);
            case (ItemSymbol item, null):
                context.Report(BindingFaults.WrongKind(name, "an item", $"name one of its moves, such as {item.Name.Text}.{(item.MoveNames is [var first, ..] ? first : "fail")}"));
                return null;
            case (null, null):
                context.Report(BindingFaults.UnknownKind(name, "event", names.NamesOf<EventSymbol>()));
                return null;
            case (null, _):
                context.Report(BindingFaults.UnknownKind(name, "item", names.NamesOf<ItemSymbol>()));
                return null;
            case (_, null):
                context.Report(BindingFaults.WrongKind(name, symbol.Kind, "'each' needs an event, or a move of an item as ITEM.MOVE"));
                return null;
            default:
                context.Report(BindingFaults.WrongKind(name, symbol.Kind, "moves belong to items"));
                return null;
        }
    }

    private List<Occurrence>? SourcesOf(ItemSymbol item, Identifier move)
    {
        // Null also where the moves of that name have faults of their own.
        var sources = moves.GetValueOrDefault((item, move.Text));
        if (sources is null && !item.MoveNames.Contains(move.Text, StringComparer.Ordinal))
        {
            context.Report(BindingFaults.UnknownMove(move, item.Name.Text, item.MoveNames));
        }

        return sources;
    }
}
