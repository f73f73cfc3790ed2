namespace ChainSolve.StateSpace;

/// <summary>The reachable states of a model for one set of counts and ranges, numbered in the order of their keys.</summary>
/// <remarks>Immutable; safe to share between threads.</remarks>
internal abstract class StateTable
{
    /// <summary>The number of states.</summary>
    public abstract int Count { get; }

    /// <summary>How many times something that is possible in a state leads to another one, over all states; alike ones count each.</summary>
    public abstract long MostTransitions { get; }

    /// <summary>Writes the marking of a state.</summary>
    /// <param name="state">The state's number, from 0.</param>
    /// <param name="marking">One entry a variable of the model.</param>
    public abstract void ReadMarking(int state, Span<int> marking);

    /// <summary>The number of the state with a marking, or -1 where it is not reachable.</summary>
    public abstract int Find(ReadOnlySpan<int> marking);

    /// <summary>The number of a successor of a state, or -1 where it is not reachable.</summary>
    public abstract int Find(int state, SuccessorList successors, int successor);
}
