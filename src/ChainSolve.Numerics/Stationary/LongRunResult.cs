using ChainSolve.Numerics.Estimates;

namespace ChainSolve.Numerics.Stationary;

/// <summary>What a chain does in the long run from a start distribution.</summary>
/// <remarks>Immutable by contract; safe to share between threads.</remarks>
public sealed record LongRunResult
{
    /// <summary>The recurrent classes that can be reached from the start, in the order of their first states.</summary>
    public required IReadOnlyList<RecurrentClass> Classes { get; init; }

    /// <summary>The limit of the distribution: one probability a state, exactly 0 where a state cannot be reached or is left for good.</summary>
    public required double[] Limit { get; init; }

    /// <summary>A bound on the relative error of every entry of <see cref="Limit"/> that is not below 1e-290.</summary>
    public required double RelativeBound { get; init; }

    /// <summary>Whether <see cref="RelativeBound"/> is proved.</summary>
    public required bool IsProved { get; init; }

    /// <summary>The name of the stationary method; <c>none</c> where every class is a single state.</summary>
    public required string StationaryMethod { get; init; }

    /// <summary>The name of the absorption method; <c>none</c> where the classes' chances follow from the start alone.</summary>
    public required string AbsorptionMethod { get; init; }

    /// <summary>How it was computed, for a reader.</summary>
    public required string How { get; init; }

    /// <summary>Why these methods were taken, for a reader.</summary>
    public required string Why { get; init; }

    /// <summary>The long-run expected value of a reward.</summary>
    /// <param name="rewards">One finite reward a state; may be negative.</param>
    /// <exception cref="ArgumentException">The rewards do not fit the chain.</exception>
    public Estimate Expected(double[] rewards)
    {
        ArgumentNullException.ThrowIfNull(rewards);
        if (rewards.Length != Limit.Length || !rewards.All(double.IsFinite))
        {
            throw new ArgumentException($"One finite reward for each of {Limit.Length} states is needed.", nameof(rewards));
        }

        var gain = NonNegative.Dot(Limit, [.. rewards.Select(r => Math.Max(r, 0))], RelativeBound, IsProved);
        if (!rewards.Any(r => r < 0))
        {
            return gain;
        }

        var loss = NonNegative.Dot(Limit, [.. rewards.Select(r => Math.Max(-r, 0))], RelativeBound, IsProved);
        var value = gain.Value - loss.Value;
        return new Estimate(value, gain.Bound + loss.Bound + (Math.Abs(value) * 1.2e-16), IsProved);
    }

    /// <summary>The long-run probability of a set of states.</summary>
    /// <param name="states">True for the states of the set; one entry a state.</param>
    /// <exception cref="ArgumentException">The set does not fit the chain.</exception>
    public Estimate Probability(bool[] states)
    {
        ArgumentNullException.ThrowIfNull(states);
        return Expected([.. states.Select(s => s ? 1.0 : 0.0)]);
    }
}
