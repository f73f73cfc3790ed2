using ChainSolve.Expressions;
using ChainSolve.Language.Diagnostics;
using ChainSolve.Modelling;
using ChainSolve.Numerics.Operators;
using ChainSolve.StateSpace;

namespace ChainSolve.Generators;

/// <summary>A model with its givens set, as a Markov chain.</summary>
/// <remarks>Immutable; safe to share between threads.</remarks>
internal abstract class Chain
{
    public abstract BoundModel Model { get; }

    public abstract GivenValues Givens { get; }

    public abstract StateTable States { get; }

    public abstract Generator Generator { get; }

    /// <summary>The start distribution: one probability a state.</summary>
    public abstract double[] Start { get; }

    /// <summary>Warnings about states: those that cannot be left, moves that are never possible, several recurrent classes.</summary>
    public abstract IReadOnlyList<Diagnostic> Warnings { get; }

    /// <summary>The value of an expression in every state.</summary>
    /// <exception cref="ModelFaultsException">A value is not a number or not finite in some state.</exception>
    public abstract double[] Evaluate(NumberExpr expression, CancellationToken cancellation);

    /// <summary>The truth of a condition in every state.</summary>
    /// <exception cref="ModelFaultsException">A number inside the condition is not a number in some state.</exception>
    public abstract bool[] Evaluate(ConditionExpr condition, CancellationToken cancellation);

    /// <summary>A state in the model's own words: <c>pump: up 2, down 1; stock = 3</c>.</summary>
    public abstract string Describe(int state);
}
