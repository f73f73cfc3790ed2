using ChainSolve.Expressions;

namespace ChainSolve.Modelling;

/// <summary>Something that is earned or lost.</summary>
internal sealed record BoundReward
{
    public required string Name { get; init; }

    /// <summary>What it earns.</summary>
    public required Earning Earning { get; init; }
}

/// <summary>What is earned in time: the object of a measure.</summary>
/// <param name="Rate">
/// The mean rate of earning in a marking: rates per unit time, and for what is earned at occurrences the rate of the
/// occurrence times its amount.
/// </param>
/// <param name="TimePower">The power of time of <paramref name="Rate"/>; totals have one more.</param>
/// <param name="Unit">The unit that the model gives to totals; null where it gives none.</param>
internal sealed record Earning(NumberExpr Rate, int TimePower, string? Unit);
