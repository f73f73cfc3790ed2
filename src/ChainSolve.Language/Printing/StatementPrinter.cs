using ChainSolve.Language.Syntax;
using static ChainSolve.Language.Printing.ExpressionPrinter;

namespace ChainSolve.Language.Printing;

/// <summary>Writes statements line by line, each line with the place in the text that it comes from.</summary>
internal static class StatementPrinter
{
    /// <summary>The lines of a statement: depth of indentation, text, and the offset behind what the line was read from.</summary>
    public static IEnumerable<PrintedLine> Lines(StatementSyntax statement) => statement switch
    {
        TitleSyntax title => One(statement, $"model {Quoted(title.Title)}"),
        TimebaseSyntax timebase => One(statement, $"timebase {timebase.Unit.Text}"),
        GivenSyntax given => One(statement, $"given {given.Name.Text} = {Print(given.Value)}{In(given.Range)}{Behind("spread", given.Spread)}"),
        LetSyntax let => One(statement, $"let {let.Name.Text}{Parameters(let.Parameters)} = {Print(let.Value)}"),
        CrewSyntax crew => One(statement, $"crew {crew.Name.Text} = {Print(crew.Count)}{(crew.IsRanked ? " ranked" : "")}"),
        CounterSyntax counter => One(statement, $"counter {counter.Name.Text} {Interval(counter.Range)}{Behind("start", counter.Start)}"),
        EventSyntax happening => Block(
            statement, $"event {happening.Name.Text} at {Print(happening.Rate)}{Behind("when", happening.When)}", happening.Effects.SelectMany(EffectLines)),
        ItemSyntax item => Block(statement, $"item {string.Join(", ", item.Heads.Select(Head))}", item.Clauses.SelectMany(ClauseLines)),
        RewardSyntax { IsShort: true } reward => One(statement, $"{RewardHead(reward)} = {RateOf((RateTermSyntax)reward.Terms[0])}"),
        RewardSyntax reward => Block(statement, RewardHead(reward), reward.Terms.SelectMany(t => One(t, TermOf(t)))),
        MeasureSyntax measure => One(statement, MeasurePrinter.Print(measure)),
        _ => throw new ArgumentException($"A statement of the type {statement.GetType().Name} has no printed form.", nameof(statement)),
    };

    public static string Interval(RangeSyntax range) => $"{Print(range.Low)} .. {Print(range.High)}";

    public static string Behind(string word, ExpressionSyntax? expression) => expression is null ? "" : $" {word} {Print(expression)}";

    private static IEnumerable<PrintedLine> One(SyntaxNode node, string text) => [new PrintedLine(0, text, node.Span.Start, node.Span.End)];

    private static IEnumerable<PrintedLine> Block(SyntaxNode node, string head, IEnumerable<PrintedLine> clauses)
    {
        var inner = clauses.Select(l => l with { Depth = l.Depth + 1 }).ToList();
        var firstClause = inner.Count > 0 ? inner[0].Start : node.Span.End;
        return [new PrintedLine(0, head + " {", node.Span.Start, firstClause), .. inner, new PrintedLine(0, "}", node.Span.End, node.Span.End)];
    }

    private static string In(RangeSyntax? range) => range is null ? "" : $" in {Interval(range)}";

    private static string Parameters(IReadOnlyList<Identifier>? parameters) =>
        parameters is null ? "" : $"({string.Join(", ", parameters.Select(p => p.Text))})";

    private static string Head(ItemHeadSyntax head)
    {
        var locals = head.Locals.Count == 0 ? "" : $" ({string.Join(", ", head.Locals.Select(l => $"{l.Name.Text} = {Print(l.Value)}"))})";
        return $"{head.Name.Text}{Behind("x", head.Count)}{locals}";
    }

    private static IEnumerable<PrintedLine> ClauseLines(ItemClauseSyntax clause) => clause switch
    {
        StatesSyntax states => One(clause, $"states {string.Join(", ", states.States.Select(s => s.Text))}"),
        StartSyntax start => One(clause, $"start {Shares(start.Shares)}"),
        MoveSyntax move => MoveLines(move),
        _ => throw new ArgumentException($"A clause of the type {clause.GetType().Name} has no printed form.", nameof(clause)),
    };

    private static IEnumerable<PrintedLine> MoveLines(MoveSyntax move)
    {
        var timing = move.Rate is { } rate ? $"at {Print(rate)}" : $"after mean {Print(move.Delay!.Mean)}";
        var crew = move.Crew is { } name ? $" by {name.Text}{Behind("rank", move.Rank)}" : "";
        var named = move.Name is { } label ? $" named {label.Text}" : "";
        var head = $"{move.From.Text} -> {Shares(move.Targets)} {timing}{Behind("when", move.When)}{crew}{named}";
        return move.Effects.Count == 0 ? One(move, head) : Block(move, head, move.Effects.SelectMany(EffectLines));
    }

    private static IEnumerable<PrintedLine> EffectLines(EffectSyntax effect) => effect switch
    {
        AssignSyntax assign => One(effect, $"{assign.Counter.Text} = {Print(assign.Value)}"),
        ItemMoveSyntax move => One(
            effect,
            $"{move.Item.Text}: {move.From.Text} -> {Shares(move.Targets)}{(move.MovesAll ? " all" : Behind("x", move.Count))}{(move.IfAny ? " if any" : "")}"),
        _ => throw new ArgumentException($"An effect of the type {effect.GetType().Name} has no printed form.", nameof(effect)),
    };

    private static string Shares(IReadOnlyList<StateShareSyntax> shares) =>
        string.Join(", ", shares.Select(s => s.Share is null ? s.State.Text : $"{s.State.Text} {Print(s.Share)}"));

    private static string RewardHead(RewardSyntax reward) => $"reward {reward.Name.Text}{(reward.Unit is { } unit ? $" in {Quoted(unit)}" : "")}";

    private static string TermOf(RewardTermSyntax term) => term switch
    {
        RateTermSyntax rate => $"rate {RateOf(rate)}",
        EachTermSyntax each => $"each {each.Source.Text}{(each.Move is { } move ? "." + move.Text : "")}{(each.Amount is { } amount ? " " + Print(amount) : "")}{Behind("while", each.While)}",
        _ => throw new ArgumentException($"A term of the type {term.GetType().Name} has no printed form.", nameof(term)),
    };

    private static string RateOf(RateTermSyntax term) => $"{Print(term.Rate)}{Behind("while", term.While)}";

    private static string Quoted(string text) => $"\"{text.Replace("\\", "\\\\", StringComparison.Ordinal).Replace("\"", "\\\"", StringComparison.Ordinal)}\"";
}
