using ChainSolve.Modelling;

namespace ChainSolve.StateSpace;

/// <summary>The reachable states of a model for one set of counts and ranges, numbered in the order of their keys.</summary>
/// <remarks>Immutable; safe to share between threads.</remarks>
internal abstract class StateTable
{
    /// <summary>Takes a state and its marking.</summary>
    public delegate void Visitor(int state, ReadOnlySpan<int> marking);

    /// <summary>The number of states.</summary>
    public abstract int Count { get; }

    /// <summary>How many pairs of different states there are, the second of which the first may lead to.</summary>
    public abstract long TransitionCount { get; }

    /// <summary>Writes the marking of a state.</summary>
    /// <param name="state">The state's number, from 0.</param>
    /// <param name="marking">One entry a variable of the model.</param>
    public abstract void ReadMarking(int state, Span<int> marking);

    /// <summary>Visits consecutive states; costs less than reading each by its number.</summary>
    public abstract void Visit(int first, int count, Visitor visitor);

    /// <summary>The number of the state with a marking, or -1 where it is not reachable.</summary>
    public abstract int Find(ReadOnlySpan<int> marking);

    /// <summary>Reads the rows of states for some values of the givens.</summary>
    public abstract StateRows Rows(GivenValues givens, CancellationToken cancellation);
}
