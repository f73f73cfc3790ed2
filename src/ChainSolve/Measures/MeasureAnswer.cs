using ChainSolve.Language.Diagnostics;

namespace ChainSolve.Measures;

/// <summary>What the solving of a measure gave, not judged yet.</summary>
internal sealed record MeasureAnswer
{
    public required MeasureAsk Ask { get; init; }

    /// <summary>The values; empty where there are none.</summary>
    public IReadOnlyList<RawPoint> Points { get; init; } = [];

    /// <summary>Why there are no values; null where there are.</summary>
    public string? Failure { get; init; }

    public string Method { get; init; } = "none";

    public string Why { get; init; } = "nothing had to be chosen";

    public string How { get; init; } = "";

    public IReadOnlyList<Diagnostic> Warnings { get; init; } = [];
}
