using ChainSolve.Modelling;
using ChainSolve.Numerics.Estimates;
using ChainSolve.Numerics.Iteration;

namespace ChainSolve;

/// <summary>What a measure of a model came to. Immutable; safe to share between threads.</summary>
public sealed record MeasureResult
{
    /// <summary>The name in the model.</summary>
    public required string Name { get; init; }

    /// <summary>The kind, in the words of the notation: <c>probability</c>, <c>mean time</c>.</summary>
    public required string Kind { get; init; }

    /// <summary>The measure as written in the model, from its kind on.</summary>
    public required string Sentence { get; init; }

    /// <summary>The unit of the values; empty for plain numbers.</summary>
    public required string Unit { get; init; }

    /// <summary>The values, in the order of the times as written; one for a measure without times, none where it failed.</summary>
    public required IReadOnlyList<MeasurePoint> Points { get; init; }

    /// <summary>
    /// <see cref="SolveStatus.Ok"/>; <see cref="SolveStatus.Short"/> where the bound of a value is wider than was asked;
    /// <see cref="SolveStatus.Failed"/> where there are no values, and <see cref="Reason"/> says why.
    /// </summary>
    public required SolveStatus Status { get; init; }

    /// <summary>Why the measure failed or fell short; null where it is well.</summary>
    public required string? Reason { get; init; }

    /// <summary>The name of the method; <c>none</c> where nothing had to be solved.</summary>
    public required string Method { get; init; }

    /// <summary>Why that method was taken.</summary>
    public required string Why { get; init; }

    /// <summary>How it was computed: figures such as sizes and steps.</summary>
    public required string How { get; init; }

    /// <summary>The value of a measure that has a single one.</summary>
    /// <exception cref="NotConvergedException">The measure failed; the message has the reason.</exception>
    /// <exception cref="InvalidOperationException">The measure has several values; see <see cref="Points"/>.</exception>
    public double Value => Single.Value;

    /// <summary>The absolute error bound of <see cref="Value"/>.</summary>
    /// <exception cref="NotConvergedException">The measure failed; the message has the reason.</exception>
    /// <exception cref="InvalidOperationException">The measure has several values; see <see cref="Points"/>.</exception>
    public double ErrorBound => Single.ErrorBound;

    /// <summary>The unit in which reports show the times.</summary>
    internal OutsideUnit TimesUnit { get; init; } = new("", 1);

    private MeasurePoint Single => (Status, Points.Count) switch
    {
        (SolveStatus.Failed, _) => throw new NotConvergedException($"{Name}: {Reason}"),
        (_, 1) => Points[0],
        _ => throw new InvalidOperationException($"{Name} has {Points.Count} values: use Points."),
    };
}
