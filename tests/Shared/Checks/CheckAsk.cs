using System.Text.Json;
using System.Text.Json.Serialization;

namespace ChainSolve.Tests.Shared.Checks;

/// <summary>What a case asks of its chain; <c>tests/checks/README.md</c> lists the words.</summary>
internal sealed record CheckAsk
{
    public required string What { get; init; }

    /// <summary>The states that are meant, by name.</summary>
    public string[]? Of { get; init; }

    /// <summary>The states that are meant, by their level: lowest and highest.</summary>
    public int[]? Levels { get; init; }

    /// <summary>The states whose entry ends the time.</summary>
    public string[]? To { get; init; }

    /// <summary>The state of the start, where the question does not depend on it.</summary>
    public string? From { get; init; }

    /// <summary>A reward a state by name, 0 for others; or the word <c>level</c>.</summary>
    public JsonElement? Rewards { get; init; }

    /// <summary>The rewards below the line of a ratio.</summary>
    [JsonPropertyName("over-rewards")]
    public JsonElement? OverRewards { get; init; }

    public double? At { get; init; }

    public double? Over { get; init; }

    public double? Share { get; init; }

    public int? Order { get; init; }

    public double? Loss { get; init; }

    /// <summary>What the result is multiplied by.</summary>
    public double Scale { get; init; } = 1;

    public double? Mean { get; init; }

    public long? Count { get; init; }

    public long? Left { get; init; }

    public long? Right { get; init; }
}
