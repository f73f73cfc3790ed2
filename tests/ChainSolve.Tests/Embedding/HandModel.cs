using ChainSolve.Generators;
using ChainSolve.Modelling;
using ChainSolve.Tests.Measures;

namespace ChainSolve.Tests.Embedding;

/// <summary>A model around a chain that is written down by hand; counts how often the chain is asked for.</summary>
internal sealed class HandModel
{
    private int builds;

    public HandModel(HandChain chain, params BoundMeasure[] measures)
        : this(chain, (_, _) => chain, measures)
    {
    }

    public HandModel(HandChain chain, Func<Chain?, CancellationToken, Chain> build, params BoundMeasure[] measures)
    {
        var holder = new ChainHolder((last, _, _, cancellation) =>
        {
            Interlocked.Increment(ref builds);
            return build(last, cancellation);
        });
        Model = new Model(chain.Model with { Measures = measures }, chain.Givens, holder, [], []);
    }

    public Model Model { get; }

    public int Builds => builds;
}
