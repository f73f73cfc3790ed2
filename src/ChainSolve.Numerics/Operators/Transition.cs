namespace ChainSolve.Numerics.Operators;

/// <summary>One transition out of a state.</summary>
/// <param name="To">The state that is entered, from 0.</param>
/// <param name="Rate">The rate per unit of time; not negative, and 0 only where a pattern was refilled with a zero.</param>
public readonly record struct Transition(int To, double Rate);
