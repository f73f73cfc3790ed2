using ChainSolve.Language.Diagnostics;
using ChainSolve.Language.Syntax;
using ChainSolve.Language.Text;

namespace ChainSolve.Binding;

/// <summary>The words of faults about names and types.</summary>
internal static partial class BindingFaults
{
    public static Fault DeclaredTwice(Identifier name, string kindBefore, int lineBefore) =>
        new(BindingCodes.DeclaredTwice, $"'{name.Text}' is already {kindBefore}, declared on line {lineBefore}; choose another name", name.Span);

    public static Fault ParameterTwice(Identifier name) =>
        new(BindingCodes.DeclaredTwice, $"the name '{name.Text}' stands twice in these brackets; choose another name", name.Span);

    public static Fault StatementTwice(string word, TextSpan span, int lineBefore) =>
        new(BindingCodes.StatementTwice, $"'{word}' may stand once; the first is on line {lineBefore}", span);

    public static Fault NothingToModel(TextSpan span) =>
        new(BindingCodes.NothingToModel, "the file has neither an item nor a counter; write what can be in which states, such as: item pump { up -> down at 1/900 h }", span);

    /// <param name="name">The name.</param>
    /// <param name="known">Names that could stand there.</param>
    /// <param name="member">The item and state that is meant perhaps; null where there is none.</param>
    public static Fault UnknownName(Identifier name, IEnumerable<string> known, Func<string?> member) =>
        new(BindingCodes.UnknownName, $"unknown name '{name.Text}'", name.Span)
        {
            Hint = () => member() is { } meant ? $"; meant is perhaps '{meant}'" : Nearest(name.Text, known)(),
        };

    public static Fault SecondState(IsSyntax test, Identifier state, string word) => new(
        TextCodes.IsForm.Code,
        $"'{test.Owner.Text} is {test.Member.Text} {word} {state.Text}' is not read; write '{test.Owner.Text} is {test.Member.Text} {word} {test.Owner.Text} is {state.Text}'",
        state.Span);

    public static Fault UnknownKind(Identifier name, string wanted, IEnumerable<string> known) =>
        new(BindingCodes.UnknownName, $"unknown {wanted} '{name.Text}'", name.Span) { Hint = Nearest(name.Text, known) };

    public static Fault WrongKind(Identifier name, string kind, string wanted) =>
        new(BindingCodes.WrongKind, $"'{name.Text}' is {kind}; {wanted}", name.Span);

    public static Fault UnknownState(Identifier state, string item, IReadOnlyList<string> known) =>
        new(BindingCodes.UnknownState, $"item '{item}' has no state '{state.Text}'; it has {Some(known)}", state.Span)
        {
            Hint = Nearest(state.Text, known),
        };

    public static Fault UnknownMove(Identifier move, string item, IReadOnlyList<string> known)
    {
        var list = known.Count == 0 ? "none of its moves is 'named'" : $"named are {Some(known)}";
        return new(BindingCodes.UnknownMove, $"item '{item}' has no move named '{move.Text}'; {list}", move.Span)
        {
            Hint = Nearest(move.Text, known),
        };
    }

    public static Fault UnknownFunction(Identifier name, IEnumerable<string> known) =>
        new(BindingCodes.UnknownFunction, $"unknown function '{name.Text}'", name.Span) { Hint = Nearest(name.Text, known) };

    public static Fault ArgumentCount(Identifier name, string wanted, int got) =>
        new(BindingCodes.ArgumentCount, $"'{name.Text}' takes {wanted}, not {got}", name.Span);

    public static Fault Cycle(Identifier name, IEnumerable<string> path) =>
        new(BindingCodes.Cycle, $"these lets lean on each other in a circle: {string.Join(" -> ", path)}", name.Span);

    public static Fault GivenNotAbove(Identifier name, string why) =>
        new(BindingCodes.GivenNotAbove, $"'{name.Text}' {why}; a given may use numbers and the givens above it", name.Span);

    public static Fault ReadsState(SourceText source, TextSpan span, string place) =>
        new(BindingCodes.ReadsState, $"{SourceWords.Quote(source, span)} depends on the state; {place} may use numbers and givens only", span);

    public static Fault NoNames(Identifier name) =>
        new(BindingCodes.UnknownName, $"'{name.Text}' is a name; a value from outside is a number with its unit", name.Span);

    public static Fault IsOnReplicas(Identifier item, string state) =>
        new(BindingCodes.IsOnReplicas, $"'{item.Text}' is declared with 'x', so 'is' has no answer; write {item.Text}.{state} >= 1 or {item.Text}.{state} = 0", item.Span);

    public static Fault TooManyCalls(Identifier name, int limit) =>
        new(BindingCodes.TooManyCalls, FormattableString.Invariant($"the functions called here expand to more than {limit} calls; name a common part with a let without parameters"), name.Span);

    public static Fault NotACondition(SourceText source, TextSpan span, string place) =>
        new(BindingCodes.NotACondition, $"{SourceWords.Quote(source, span)} is a number; {place} needs a condition, such as a comparison", span);

    public static Fault NotANumber(SourceText source, TextSpan span, string place) =>
        new(BindingCodes.NotANumber, $"{SourceWords.Quote(source, span)} is a condition; {place} needs a number; count({Short(source, span)}) is 1 where it holds and 0 elsewhere", span);

    public static Fault ComparedConditions(SourceText source, TextSpan span) =>
        new(BindingCodes.NotANumber, $"{SourceWords.Quote(source, span)} is a condition; only numbers are compared, conditions are joined with 'and', 'or' and 'not'", span);

    public static Fault BranchesDiffer(TextSpan span) =>
        new(BindingCodes.BranchesDiffer, "one branch of this 'if' is a number and the other a condition; both have to be of one kind", span);

    public static Fault MoreFaults(int more, TextSpan span) =>
        new(BindingCodes.MoreFaults, FormattableString.Invariant($"{more} more faults are not shown; the next one is here"), span);

    public static Fault MoreWarnings(int more, TextSpan span) =>
        new(BindingCodes.MoreWarnings, FormattableString.Invariant($"{more} more warnings are not shown; the next one is here"), span);

    public static Fault Unused(Symbol symbol) => Unused(symbol.Name, symbol.Kind);

    public static Fault Unused(Identifier name, string kind) =>
        new(BindingCodes.Unused, $"nothing uses '{name.Text}', {kind}", name.Span);

    private static Func<string> Nearest(string name, IEnumerable<string> known) =>
        () => Suggestions.Nearest(name, known) is { } nearest ? $"; nearest: '{nearest}'" : "";

    private static string Some(IReadOnlyList<string> names)
    {
        const int most = 12;
        return names.Count <= most ? string.Join(", ", names) : $"{string.Join(", ", names.Take(most))}, …";
    }

    private static string Short(SourceText source, TextSpan span)
    {
        var text = SourceWords.OneLine(source.Slice(span));
        return text.Length > 20 ? "…" : text;
    }
}
