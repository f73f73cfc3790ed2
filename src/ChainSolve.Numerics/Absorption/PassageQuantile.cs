using ChainSolve.Numerics.Estimates;

namespace ChainSolve.Numerics.Absorption;

/// <summary>A quantile of the time until a chain leaves a set of states, and how it was found.</summary>
/// <param name="Time">The time; infinite where the set is left with too small a chance.</param>
/// <param name="ChanceOfLeaving">The probability that the set is ever left; 1 where no group of states holds the chain for good.</param>
/// <param name="Method">The name of the transient method that was asked for values; <c>none</c> where none was needed.</param>
/// <param name="Why">Why that method was taken, for a reader.</param>
/// <param name="How">How the quantile was found, for a reader.</param>
/// <remarks>Immutable; safe to share between threads.</remarks>
public sealed record PassageQuantile(Estimate Time, Estimate ChanceOfLeaving, string Method, string Why, string How);
