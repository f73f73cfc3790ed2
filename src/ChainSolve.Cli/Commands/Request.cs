namespace ChainSolve.Cli.Commands;

/// <summary>What the common options of a command asked for; null where an option was not given.</summary>
internal sealed record Request
{
    /// <summary>The path of the model, or <c>-</c>.</summary>
    public required string File { get; init; }

    /// <summary>Names of givens and the texts of their values, in the order given.</summary>
    public required IReadOnlyList<Setting> Settings { get; init; }

    public required double? Tolerance { get; init; }

    public required double? Negligible { get; init; }

    /// <summary>Prescribed methods by job.</summary>
    public required IReadOnlyDictionary<string, string> Methods { get; init; }

    public required int? Threads { get; init; }

    public required long? MaxStates { get; init; }

    /// <summary>In bytes.</summary>
    public required long? MaxMemory { get; init; }

    public required TimeSpan? TimeLimit { get; init; }

    /// <summary>The time limit as it was written.</summary>
    public required string? TimeLimitText { get; init; }

    public required string Format { get; init; }

    /// <summary>The file for the answer; null for standard output.</summary>
    public required string? Output { get; init; }

    public required bool IsQuiet { get; init; }

    public required string Color { get; init; }
}
