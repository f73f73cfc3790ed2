using ChainSolve.Language.Diagnostics;

namespace ChainSolve.StateSpace;

/// <summary>The codes of faults and warnings that only states show. A code is never used again for something else.</summary>
internal static class StateCodes
{
    public const string KeyTooWide = "S201";
    public const string Rate = "S202";
    public const string Probability = "S203";
    public const string MoveCount = "S204";
    public const string TooFew = "S205";
    public const string CounterNotWhole = "S206";
    public const string CounterRange = "S207";
    public const string Value = "S208";
    public const string CannotBeLeft = "S301";
    public const string SeveralEnds = "S302";
    public const string NeverPossible = "S303";

    /// <summary>Every code with the title of its page.</summary>
    public static IReadOnlyList<DiagnosticCode> All { get; } =
    [
        new(KeyTooWide, "a model whose states take more than 128 bits"),
        new(Rate, "a rate that is negative, infinite or not a number in some state"),
        new(Probability, "probabilities of drawn targets that do not add to 1 in some state"),
        new(MoveCount, "a number of moving replicas that is negative or not whole in some state"),
        new(TooFew, "an effect that is not possible in some state"),
        new(CounterNotWhole, "a counter that would take a value that is not whole"),
        new(CounterRange, "a counter that would leave its range"),
        new(Value, "a value that is infinite or not a number in some state"),
        new(CannotBeLeft, "states that cannot be left"),
        new(SeveralEnds, "several sets of states that are never left again"),
        new(NeverPossible, "a move or event that is never possible"),
    ];
}
