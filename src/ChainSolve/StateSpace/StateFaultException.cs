using ChainSolve.Modelling;

namespace ChainSolve.StateSpace;

/// <summary>Ends the work on one state with a fault; caught where the way to the state is known.</summary>
internal sealed class StateFaultException(string code, BoundTransition transition, string message) : Exception(message)
{
    public string Code { get; } = code;

    public BoundTransition Transition { get; } = transition;
}
