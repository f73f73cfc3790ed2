using ChainSolve.Numerics.Estimates;
using ChainSolve.Numerics.Transient;

namespace ChainSolve;

/// <summary>The chances of being in each state of a model after some time, by the state one starts from.</summary>
/// <remarks>Immutable; safe to share between threads.</remarks>
public sealed class StateMatrix
{
    private readonly TransitionMatrix matrix;

    internal StateMatrix(Model model, TransitionMatrix matrix, IReadOnlyList<string> states)
    {
        (Model, this.matrix, States) = (model, matrix, states);
    }

    /// <summary>The model.</summary>
    public Model Model { get; }

    /// <summary>The states in the model's own words, in the order of rows and columns.</summary>
    public IReadOnlyList<string> States { get; }

    /// <summary>The time, in the model's unit.</summary>
    public double Time => matrix.Time;

    /// <summary>How it was computed, for a reader.</summary>
    public string How => matrix.How;

    /// <summary>The chance of being in one state at the time, having started in another.</summary>
    /// <param name="from">The state of the start, from 0.</param>
    /// <param name="to">The state at the time, from 0.</param>
    /// <exception cref="ArgumentOutOfRangeException">There is no such state.</exception>
    public Estimate this[int from, int to] => matrix[from, to];
}
