using ChainSolve.Language.Syntax;
using ChainSolve.Language.Text;

namespace ChainSolve.Binding;

/// <summary>The words of faults about items, crews, counters and events.</summary>
internal static partial class BindingFaults
{
    public static Fault NoStates(Identifier item) =>
        new(BindingCodes.NoStates, $"item '{item.Text}' has no states; write its moves, or list them: states a, b", item.Span);

    public static Fault StateTwice(Identifier state) =>
        new(BindingCodes.StateTwice, $"state '{state.Text}' is listed twice", state.Span);

    public static Fault StartNeedsCounts(Identifier state) =>
        new(BindingCodes.StartNumbers, $"how many start in '{state.Text}'? where several states are named each needs its count, such as {state.Text} 1", state.Span);

    public static Fault StartNeedsShares(Identifier state) =>
        new(BindingCodes.StartNumbers, $"how likely is a start in '{state.Text}'? where several states are named each needs its probability, such as {state.Text} 0.5", state.Span);

    public static Fault TargetNeedsShare(Identifier state) =>
        new(BindingCodes.TargetNumbers, $"how likely is '{state.Text}'? where several targets are named each needs its probability, such as {state.Text} 0.5", state.Span);

    public static Fault TargetIsOnly(Identifier state, TextSpan share) =>
        new(BindingCodes.TargetNumbers, $"'{state.Text}' is the only target and needs no probability; name the others or leave it out", share);

    public static Fault RankMissing(Identifier crew) =>
        new(BindingCodes.Rank, $"crew '{crew.Text}' is ranked; write the rank behind it: by {crew.Text} rank 1", crew.Span);

    public static Fault RankUnwanted(Identifier? crew, TextSpan span) => new(
        BindingCodes.Rank,
        crew is null ? "a rank needs a crew before it: by CREW rank 1" : $"crew '{crew.Text}' has no ranks; declare it with 'ranked' or leave out the rank",
        span);

    public static Fault RankNotFixed(SourceText source, TextSpan span) =>
        new(BindingCodes.Rank, $"a rank is a fixed number; {SourceWords.Quote(source, span)} is not", span);

    public static Fault AfterTwice(Identifier from, TextSpan span) =>
        new(BindingCodes.AfterTwice, $"state '{from.Text}' is left by an 'after' already, and only one is possible; write this move with 'at'", span);

    public static Fault AssignedTwice(Identifier counter) =>
        new(BindingCodes.AssignedTwice, $"counter '{counter.Text}' gets two values in one instant; put both changes into one line", counter.Span);

    public static Fault AllTwice(Identifier from, TextSpan span) =>
        new(BindingCodes.AllTwice, $"another line moves all that are in '{from.Text}' already", span);

    public static Fault SharedRepair(Identifier crew, double jobs, double size) =>
        new(
            BindingCodes.SharedRepair,
            FormattableString.Invariant($"up to {jobs} jobs can be open for {size} of crew '{crew.Text}', and the jobs are memoryless: the time of those under way can be overstated (IEC 61165)"),
            crew.Span);
}
