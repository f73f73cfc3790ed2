using ChainSolve.Expressions;

namespace ChainSolve.Generators;

/// <summary>How a model is explored.</summary>
internal sealed record ExploreOptions
{
    /// <summary>The most states.</summary>
    public long MaxStates { get; init; } = 20_000_000;

    /// <summary>The most bytes for states and transitions.</summary>
    public long MaxMemory { get; init; } = long.MaxValue;

    /// <summary>How rates and guards are evaluated.</summary>
    public ExprBackEnd BackEnd { get; init; } = ExprBackEnd.Fastest;
}
