namespace ChainSolve.Tests.Shared.Checks;

/// <summary>One value with its source, as the files in <c>tests/checks</c> hold it.</summary>
internal sealed record CheckCase
{
    public required string Id { get; init; }

    public required string Source { get; init; }

    public required string Kind { get; init; }

    public required string Provenance { get; init; }

    public string? Note { get; init; }

    /// <summary>The chain; null where the case needs none.</summary>
    public CheckChain? Chain { get; init; }

    /// <summary>The same chain given by a rule, for the models that are written with replicas or counters.</summary>
    public CheckChain? Twin { get; init; }

    public required CheckAsk Ask { get; init; }

    /// <summary>The value to 25 digits.</summary>
    public required string Expected { get; init; }

    /// <summary>The relative error that is allowed.</summary>
    public required double Tolerance { get; init; }

    /// <summary>How far the rounding of the numbers of the chain to doubles can move the answer, relative.</summary>
    public double Rounding { get; init; } = 1.1e-15;

    /// <summary>What the source prints; null where it was computed from a formula.</summary>
    public string? Published { get; init; }
}
