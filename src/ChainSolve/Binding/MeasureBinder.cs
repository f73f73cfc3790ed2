using ChainSolve.Expressions;
using ChainSolve.Language.Syntax;
using ChainSolve.Modelling;

namespace ChainSolve.Binding;

/// <summary>Binds what is to be computed.</summary>
internal sealed class MeasureBinder(BindContext context, NameTable names, ExpressionBinder expressions, SentenceText sentences)
{
    private readonly TimesBinder times = new(context, names, expressions);

    /// <summary>The measure; null after a fault.</summary>
    public BoundMeasure? Bind(MeasureSyntax syntax)
    {
        context.Sink.Enter(syntax);
        var words = MeasureForms.Words(syntax.Kind);
        if (!MeasureForms.Scopes(syntax.Kind).Contains(syntax.Scope))
        {
            context.Report(BindingFaults.MeasureForm(syntax, words, MeasureForms.Describe(syntax.Kind)));
            return null;
        }

        var subject = BindSubject(syntax, words);
        var until = syntax.Until is null ? null : expressions.BindCondition(syntax.Until, ExprScope.Top, "'until'");
        var share = syntax.Share is null
            ? null
            : expressions.BindQuantity(syntax.Share, ExprScope.Fixed("the share of a quantile"), Dimension.Plain, "the share of a quantile");
        var points = times.Bind(syntax.Times);
        if (subject is not { } measured || points is null || (until is null) != (syntax.Until is null) || (share is null) != (syntax.Share is null))
        {
            return null;
        }

        var (power, unit) = ResultUnits.Of(syntax.Kind, syntax.Scope, measured.Earning, context.TimeBase);
        return new BoundMeasure
        {
            Name = syntax.Name.Text,
            Kind = syntax.Kind,
            Scope = syntax.Scope,
            Condition = measured.Condition,
            Object = measured.Earning,
            Share = share?.Expr,
            Times = points,
            TimesUnit = times.UnitOf(syntax.Times),
            Until = until?.Expr,
            TimePower = power,
            Unit = unit,
            Sentence = sentences.Of(syntax),
            Span = syntax.Name.Span,
        };
    }

    private (ConditionExpr? Condition, Earning? Earning)? BindSubject(MeasureSyntax syntax, string words)
    {
        if (MeasureForms.TakesObject(syntax.Kind) && RewardOf(syntax, out var reward))
        {
            return reward is null ? null : (null, reward);
        }

        var scope = MeasureForms.TakesObject(syntax.Kind) ? ExprScope.Top with { AlsoMeant = names.NamesOf<RewardSymbol>() } : ExprScope.Top;
        var value = expressions.Bind(syntax.Subject, scope);
        var condition = syntax.While is null ? null : expressions.BindCondition(syntax.While, ExprScope.Top, "'while'");
        if (value is null || (condition is null) != (syntax.While is null))
        {
            return null;
        }

        return value switch
        {
            Truth truth => Condition(truth, syntax, words),
            Quantity number => Object(number, condition, syntax, words),
            _ => null,
        };
    }

    private (ConditionExpr?, Earning?)? Condition(Truth truth, MeasureSyntax syntax, string words)
    {
        if (!MeasureForms.TakesCondition(syntax.Kind))
        {
            context.Report(BindingFaults.NotANumber(context.Source, syntax.Subject.Span, $"'{words}'"));
            return null;
        }

        if (syntax.While is not null)
        {
            context.Report(BindingFaults.WhileOfCondition(context.Source, syntax.Subject.Span));
            return null;
        }

        return (truth.Expr, null);
    }

    private (ConditionExpr?, Earning?)? Object(Quantity number, Truth? condition, MeasureSyntax syntax, string words)
    {
        if (!MeasureForms.TakesObject(syntax.Kind))
        {
            context.Report(BindingFaults.NotACondition(context.Source, syntax.Subject.Span, $"'{words}'"));
            return null;
        }

        if (!IsObject(syntax))
        {
            context.Report(BindingFaults.NotAnObject(context.Source, syntax.Subject.Span));
            return null;
        }

        var rate = condition is null ? number.Expr : ExprNodes.Choose(condition.Expr, number.Expr, ExprNodes.Number(0));
        return (null, new Earning(rate, number.Dimension.Power, null));
    }

    // Anything else stands in brackets, so that it is plain where it ends.
    private bool IsObject(MeasureSyntax syntax) => syntax.Subject switch
    {
        BracketSyntax or MemberSyntax => true,
        NameSyntax name => names.Find(name.Name.Text) is CounterSymbol or LetSymbol,
        CallSyntax call => names.Find(call.Function.Text) is LetSymbol,
        _ => syntax.While is not null,
    };

    private bool RewardOf(MeasureSyntax syntax, out Earning? earning)
    {
        earning = null;
        var isBare = syntax.While is null;
        var inner = syntax.Subject;
        while (inner is BracketSyntax bracket)
        {
            isBare = false;
            inner = bracket.Inner;
        }

        if (inner is not NameSyntax name || names.Find(name.Name.Text) is not RewardSymbol reward)
        {
            return false;
        }

        reward.IsUsed = true;
        if (isBare)
        {
            earning = reward.Earning;
        }
        else
        {
            context.Report(BindingFaults.RewardInBrackets(name.Name));
        }

        return true;
    }
}
