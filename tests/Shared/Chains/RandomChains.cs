using FsCheck;
using FsCheck.Fluent;

namespace ChainSolve.Tests.Shared.Chains;

/// <summary>Sources of random chains for properties; what shrinks keeps the promise of its source.</summary>
internal static class RandomChains
{
    /// <summary>Any structure with 1 to 12 states.</summary>
    public static Arbitrary<RandomChain> Any(double lowRateTime, double highRateTime, int largest = 12) =>
        From(ChainMaker.Shapes, lowRateTime, highRateTime, largest, _ => true);

    /// <summary>Irreducible chains.</summary>
    public static Arbitrary<RandomChain> Irreducible(double lowRateTime, double highRateTime, int largest = 12) =>
        From(ChainMaker.Shapes[..ChainMaker.IrreducibleCount], lowRateTime, highRateTime, largest, IsIrreducible);

    /// <summary>Whether every state can be reached from every other.</summary>
    public static bool IsIrreducible(RandomChain chain) => chain.Reference.Reachable().Cast<bool>().All(r => r);

    private static Arbitrary<RandomChain> From(string[] shapes, double low, double high, int largest, Func<RandomChain, bool> promise)
    {
        var gen =
            from shape in Gen.Elements(shapes)
            from count in Gen.Choose(1, largest)
            from seed in Gen.Choose(0, int.MaxValue - 1)
            select new ChainMaker(new Random(seed)).Make(shape, count, low, high);
        return Arb.From(gen.Where(promise), chain => chain.Shrink().Where(promise));
    }
}
