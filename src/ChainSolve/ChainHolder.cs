using System.Globalization;
using ChainSolve.Generators;
using ChainSolve.Modelling;

namespace ChainSolve;

/// <summary>
/// Keeps the chain that a model was last solved for, so that other givens refill it instead of exploring again. Shared by all
/// models that come from one text; safe to share between threads.
/// </summary>
/// <param name="build">Makes a chain for givens, from the last one where there is one.</param>
internal sealed class ChainHolder(Func<Chain?, GivenValues, SolveOptions, CancellationToken, Chain> build)
{
    private Chain? last;

    /// <summary>The chain for some givens.</summary>
    /// <exception cref="LimitExceededException">There are more states than are allowed.</exception>
    public Chain Get(GivenValues givens, SolveOptions options, CancellationToken cancellation)
    {
        // Several threads may each build one; every one of them is right, and the last is kept.
        var known = Volatile.Read(ref last);
        var chain = known;
        if (known is null || !known.Givens.AsSpan().SequenceEqual(givens.AsSpan()))
        {
            chain = build(known, givens, options, cancellation);
            Volatile.Write(ref last, chain);
        }

        if (chain!.Generator.StateCount > options.MaxStates)
        {
            throw new LimitExceededException("states", string.Create(
                CultureInfo.InvariantCulture,
                $"the model has {chain.Generator.StateCount:N0} states, more than the {options.MaxStates:N0} allowed; raise the limit (MaxStates, --max-states) or write alike things as one item with 'x N'"));
        }

        return chain;
    }
}
