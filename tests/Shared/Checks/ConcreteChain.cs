namespace ChainSolve.Tests.Shared.Checks;

/// <summary>A chain of a check with all its states and moves written out.</summary>
internal sealed record ConcreteChain
{
    public required IReadOnlyList<string> Names { get; init; }

    /// <summary>A whole number a state that the questions of its family speak of, such as the number of customers.</summary>
    public required IReadOnlyList<int> Levels { get; init; }

    public required IReadOnlyList<(int From, int To, double Rate)> Moves { get; init; }

    /// <summary>The start distribution.</summary>
    public required double[] Start { get; init; }

    public int Count => Names.Count;

    public static ConcreteChain From(CheckChain chain)
    {
        var bare = chain.Family is null ? Explicit(chain) : ChainFamilies.Expand(chain);
        var index = bare.Names.Select((name, at) => (name, at)).ToDictionary(p => p.name, p => p.at, StringComparer.Ordinal);
        foreach (var (name, share) in chain.Start ?? new() { [bare.Names[0]] = 1 })
        {
            bare.Start[index[name]] = share;
        }

        return bare;
    }

    /// <summary>The states that a question means.</summary>
    public int[] Select(string[]? names, int[]? levels) =>
        [.. Enumerable.Range(0, Count).Where(i => names is not null ? names.Contains(Names[i]) : Levels[i] >= levels![0] && Levels[i] <= levels[1])];

    /// <summary>The rewards that a question means.</summary>
    public double[] Rewards(System.Text.Json.JsonElement rewards) => rewards.ValueKind == System.Text.Json.JsonValueKind.String
        ? [.. Levels.Select(level => (double)level)]
        : [.. Names.Select(name => rewards.TryGetProperty(name, out var value) ? value.GetDouble() : 0)];

    private static ConcreteChain Explicit(CheckChain chain)
    {
        var index = chain.States!.Select((name, at) => (name, at)).ToDictionary(p => p.name, p => p.at, StringComparer.Ordinal);
        return new ConcreteChain
        {
            Names = chain.States!,
            Levels = [.. Enumerable.Range(0, chain.States!.Length)],
            Moves = [.. chain.Moves!.Select(m => (index[m.From], index[m.To], m.Rate))],
            Start = new double[chain.States!.Length],
        };
    }
}
