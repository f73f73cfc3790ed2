using ChainSolve.Numerics.Arithmetic;
using ChainSolve.Numerics.Estimates;
using ChainSolve.Numerics.Iteration;
using ChainSolve.Numerics.Operators;

namespace ChainSolve.Numerics.Absorption;

/// <summary>
/// The first time at which a chain leaves a set of states: its chance, moments, where the time is spent, what is earned
/// on the way, and where the chain goes. Start mass outside the set has left at time 0.
/// </summary>
/// <remarks>
/// Immutable; safe to share between threads. All values are sums and products of non-negative numbers, so that tiny and
/// huge ones keep their digits. With S the generator within the set, sojourns are p0 (-S)⁻¹ and moments follow from
/// (-S) m_k = k m_{k-1} (Neuts, Matrix-Geometric Solutions in Stochastic Models, 1981; from memory).
/// </remarks>
public sealed partial class FirstPassage
{
    private readonly Generator generator;
    private readonly double[] start;
    private readonly bool[] alive;

    // The states of the set that are reached and left again for good; closed classes are taken out.
    private readonly bool[] open;
    private readonly double bound;
    private readonly bool isProved;
    private readonly double[]?[] momentVectors;

    private FirstPassage(
        Generator generator, double[] start, bool[] alive, bool[] open, IReadOnlyList<int[]> closedClasses, Solved solved)
    {
        (this.generator, this.start, this.alive, this.open) = (generator, start, alive, open);
        ClosedClasses = closedClasses;
        (Sojourns, bound, isProved, momentVectors) = (solved.Sojourns, solved.Bound, solved.IsProved, solved.Moments);
        (Method, How, Why) = (solved.Method, solved.How, solved.Why);
    }

    /// <summary>The groups of states within the set that can be reached and are never left once entered.</summary>
    public IReadOnlyList<int[]> ClosedClasses { get; }

    /// <summary>Whether the set is left with probability one.</summary>
    public bool IsCertain => ClosedClasses.Count == 0;

    /// <summary>
    /// The expected time in each state before the end; 0 outside of the set and where the start does not lead. Infinite in
    /// <see cref="ClosedClasses"/>, and where it is beyond the range of a double.
    /// </summary>
    public double[] Sojourns { get; }

    /// <summary>A bound on the relative error of every finite entry of <see cref="Sojourns"/> that is not below 1e-290.</summary>
    public double SojournBound => bound;

    /// <summary>The name of the method; <c>none</c> where nothing had to be solved.</summary>
    public string Method { get; }

    /// <summary>How it was computed, for a reader.</summary>
    public string How { get; }

    /// <summary>Why the method was taken, for a reader.</summary>
    public string Why { get; }

    /// <summary>The highest moment that can be asked.</summary>
    public int HighestMoment => momentVectors.Length;

    /// <summary>Why the mean time is infinite; null where it is finite.</summary>
    public string? WhyInfinite => IsCertain
        ? null
        : $"from the start the chain can enter state {ClosedClasses[0][0]}{(ClosedClasses[0].Length > 1 ? " and its group" : "")}, which it never leaves";

    /// <summary>The probability that the set is ever left.</summary>
    public Estimate ChanceOfLeaving => IsCertain && LongSum.Of(start) is 1 ? Estimate.Exact(1) : ChanceOfEntering([.. alive.Select(a => !a)]);

    /// <summary>The probability that the set is never left: of ending in one of <see cref="ClosedClasses"/>.</summary>
    public Estimate ChanceOfStaying => IsCertain ? Estimate.Zero : Entering(InClosed());

    /// <summary>The mean time until the set is left; infinite where it may never be left.</summary>
    /// <exception cref="NotConvergedException">The mean is finite but beyond the range of a double.</exception>
    public Estimate MeanTime => Reward([.. alive.Select(a => a ? 1.0 : 0.0)]);

    /// <summary>The probability that the first state outside of the set is one of some states.</summary>
    /// <param name="states">True for the states meant; members of the set among them do not count. A start there counts.</param>
    /// <exception cref="ArgumentException">The mask does not fit the chain.</exception>
    public Estimate ChanceOfEntering(bool[] states)
    {
        StartCheck.Length(generator, states, nameof(states));
        return Entering([.. states.Select((s, i) => s && !alive[i])]);
    }

    /// <summary>
    /// The expected sum of a reward until the set is left. Finite also where the set may never be left, as long as no
    /// reward flows there; otherwise infinite.
    /// </summary>
    /// <param name="rewards">The reward per unit of time in each state, finite and not negative; ignored outside of the set.</param>
    /// <exception cref="ArgumentException">The rewards do not fit the chain.</exception>
    /// <exception cref="NotConvergedException">The sum is finite but beyond the range of a double.</exception>
    public Estimate Reward(double[] rewards)
    {
        StartCheck.Rewards(generator, rewards, nameof(rewards));
        if (WhyRewardIsInfinite(rewards) is not null)
        {
            return Estimate.Infinite;
        }

        return Finite(NonNegative.Dot(Sojourns, [.. rewards.Select((r, i) => open[i] ? r : 0)], bound, isProved));
    }

    /// <summary>Why an expected reward is infinite; null where it is finite.</summary>
    /// <param name="rewards">As for <see cref="Reward"/>.</param>
    public string? WhyRewardIsInfinite(double[] rewards)
    {
        StartCheck.Rewards(generator, rewards, nameof(rewards));
        foreach (var group in ClosedClasses)
        {
            if (group.FirstOrDefault(i => rewards[i] > 0, -1) is var state and >= 0)
            {
                return $"from the start the chain can enter state {state}, earns there, and never leaves it{(group.Length > 1 ? " and its group" : "")}";
            }
        }

        return null;
    }

    private static Estimate Finite(Estimate value) => double.IsFinite(value.Value)
        ? value
        : throw new NotConvergedException("The value is finite but larger than 1.8e308, more than a double holds. Choose a larger unit of time.");

    private bool[] InClosed()
    {
        var inside = new bool[alive.Length];
        foreach (var i in ClosedClasses.SelectMany(c => c))
        {
            inside[i] = true;
        }

        return inside;
    }

    private Estimate Entering(bool[] target)
    {
        LongSum sum = default;
        var rows = generator.Rows;
        for (var i = 0; i < target.Length; i++)
        {
            if (target[i])
            {
                sum.Add(start[i]);
            }

            for (var e = rows.Offsets[i]; open[i] && e < rows.Offsets[i + 1]; e++)
            {
                if (target[rows.Targets[e]])
                {
                    sum.AddProduct(Sojourns[i], rows.Values[e]);
                }
            }
        }

        return Finite(NonNegative.Relative(sum.Value, bound + LongSum.Rounding, isProved));
    }

    private sealed record Solved(
        double[] Sojourns, double Bound, bool IsProved, double[]?[] Moments, string Method, string How, string Why);
}
