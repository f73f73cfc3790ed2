namespace ChainSolve;

/// <summary>The most likely states of a model, the most likely first. Immutable; safe to share between threads.</summary>
public sealed record LikelyStates
{
    /// <summary>The model.</summary>
    public required Model Model { get; init; }

    /// <summary>The time, in the model's unit; null for the long run.</summary>
    public required double? Time { get; init; }

    /// <summary>The states; of equally likely ones the one that the model numbers first comes first.</summary>
    public required IReadOnlyList<LikelyState> States { get; init; }

    /// <summary>How many states the model has.</summary>
    public required int StateCount { get; init; }

    /// <summary>The name of the method.</summary>
    public required string Method { get; init; }

    /// <summary>How it was computed, for a reader.</summary>
    public required string How { get; init; }
}

/// <summary>A state of a model and its chance. Immutable; safe to share between threads.</summary>
/// <param name="Description">The state in the model's own words.</param>
/// <param name="Probability">The chance of being in it.</param>
/// <param name="ErrorBound">An absolute bound on the error of the chance.</param>
public sealed record LikelyState(string Description, double Probability, double ErrorBound);
