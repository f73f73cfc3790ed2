using ChainSolve.Language.Syntax;

namespace ChainSolve.Binding;

/// <summary>The expressions of a statement.</summary>
internal static class StatementParts
{
    public static IEnumerable<ExpressionSyntax> Expressions(StatementSyntax statement) => Optional(statement).OfType<ExpressionSyntax>();

    private static IEnumerable<ExpressionSyntax?> Optional(StatementSyntax statement) => statement switch
    {
        GivenSyntax given => [given.Value, given.Range?.Low, given.Range?.High, given.Spread],
        LetSyntax let => [let.Value],
        CrewSyntax crew => [crew.Count],
        CounterSyntax counter => [counter.Range.Low, counter.Range.High, counter.Start],
        ItemSyntax item => item.Heads
            .SelectMany(h => h.Locals.Select(l => l.Value).Prepend(h.Count))
            .Concat(item.Clauses.SelectMany(Clause)),
        EventSyntax happening => happening.Effects.SelectMany(Effect).Prepend(happening.When).Prepend(happening.Rate),
        RewardSyntax reward => reward.Terms.SelectMany(Term),
        MeasureSyntax measure => measure.Times
            .SelectMany(Times)
            .Concat([measure.Subject, measure.While, measure.Share, measure.Until]),
        _ => [],
    };

    private static IEnumerable<ExpressionSyntax?> Clause(ItemClauseSyntax clause) => clause switch
    {
        StartSyntax start => start.Shares.Select(s => s.Share),
        MoveSyntax move => move.Targets
            .Select(t => t.Share)
            .Concat([move.Rate, move.Delay?.Mean, move.When, move.Rank])
            .Concat(move.Effects.SelectMany(Effect)),
        _ => [],
    };

    private static IEnumerable<ExpressionSyntax?> Effect(EffectSyntax effect) => effect switch
    {
        AssignSyntax assign => [assign.Value],
        ItemMoveSyntax move => move.Targets.Select(t => t.Share).Append(move.Count),
        _ => [],
    };

    private static IEnumerable<ExpressionSyntax?> Term(RewardTermSyntax term) => term switch
    {
        RateTermSyntax rate => [rate.Rate, rate.While],
        EachTermSyntax each => [each.Amount, each.While],
        _ => [],
    };

    private static IEnumerable<ExpressionSyntax?> Times(TimeTermSyntax term) => term switch
    {
        SingleTimeSyntax single => [single.Time],
        StepTimesSyntax step => [step.Range.Low, step.Range.High, step.Step],
        LogTimesSyntax log => [log.Range.Low, log.Range.High, log.Points],
        _ => [],
    };
}
