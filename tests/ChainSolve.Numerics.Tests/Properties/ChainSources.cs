using ChainSolve.Tests.Shared.Chains;
using FsCheck;

namespace ChainSolve.Numerics.Tests.Properties;

/// <summary>Any structure, and times short enough for a step by step method.</summary>
public static class MildChains
{
    public static Arbitrary<RandomChain> Chains() => RandomChains.Any(1e-9, 1e3);
}

/// <summary>Any structure, and times up to ten powers of ten beyond the fastest rate and more.</summary>
public static class StiffChains
{
    public static Arbitrary<RandomChain> Chains() => RandomChains.Any(1e-9, 1e13);
}

/// <summary>Any structure, and times over which little oscillates.</summary>
public static class SmoothChains
{
    public static Arbitrary<RandomChain> Chains() => RandomChains.Any(1e-3, 6);
}

/// <summary>Irreducible chains of up to 60 states.</summary>
public static class IrreducibleChains
{
    public static Arbitrary<RandomChain> Chains() => RandomChains.Irreducible(1e-3, 1e3, 60);
}
