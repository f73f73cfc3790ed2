using ChainSolve.Expressions;

namespace ChainSolve.StateSpace;

/// <summary>What a transition does to a key, or one outcome of it.</summary>
/// <param name="Shift">What it adds, modulo the size of a key.</param>
/// <param name="Needs">Where the variables have to be for it to be possible; null where what it does has to be worked out for each state.</param>
/// <param name="IsDrawn">Whether it is one of several outcomes, among which the rate is shared out.</param>
internal readonly record struct SuccessorStep(UInt128 Shift, VariableRange[]? Needs, bool IsDrawn)
{
    /// <summary>Whether it leads back to the same state.</summary>
    public bool IsStill => Shift == 0;

    /// <summary>Whether both always lead to the same state.</summary>
    public bool LeadsTheSameWay(SuccessorStep other) => Needs is not null && other.Needs is not null && Shift == other.Shift;
}
