using System.Globalization;
using System.Text;

namespace ChainSolve.Tests.StateSpace;

/// <summary>A random small model with items, a crew, a counter and events, in which every effect is possible wherever it is enabled.</summary>
internal sealed class RandomModelText(int seed)
{
    private static readonly string[] Comparisons = ["=", "!=", "<", "<=", ">", ">="];

    private readonly Random random = new(seed);
    private readonly StringBuilder text = new();
    private int[] counts = [];
    private int[] states = [];

    public string Make()
    {
        counts = [.. Enumerable.Range(0, random.Next(1, 4)).Select(_ => random.Next(0, 5))];
        states = [.. counts.Select(_ => random.Next(2, 4))];
        text.AppendLine("given fast = 3").AppendLine("given slow = 0.25").AppendLine("given part = 0.375");
        text.Append(CultureInfo.InvariantCulture, $"crew fitter = {random.Next(0, 3)}\n");
        text.AppendLine("counter n 0 .. 3 start 1");
        for (var item = 0; item < counts.Length; item++)
        {
            AddItem(item);
        }

        for (var e = random.Next(3); e >= 0; e--)
        {
            text.Append(CultureInfo.InvariantCulture, $"event e{e} at {Rate()}{Condition()} {{ {Effects(-1, -1)} }}\n");
        }

        return text.ToString();
    }

    private void AddItem(int item)
    {
        // A count of zero stands for a lone item.
        var head = counts[item] == 0 ? $"item u{item}" : $"item u{item} x {counts[item]}";
        text.Append(CultureInfo.InvariantCulture, $"{head} {{\n states {string.Join(", ", Enumerable.Range(0, states[item]).Select(s => $"s{s}"))}\n");
        for (var move = random.Next(2, 5); move > 0; move--)
        {
            var from = random.Next(states[item]);
            var crew = random.Next(3) == 0 ? " by fitter" : "";
            var effects = random.Next(3) == 0 ? $" {{ {Effects(item, from)} }}" : "";
            text.Append(CultureInfo.InvariantCulture, $" s{from} -> {Targets(item)} at {Rate()}{Condition()}{crew}{effects}\n");
        }

        text.AppendLine("}");
    }

    private string Targets(int item) => random.Next(4) switch
    {
        0 => $"s{random.Next(states[item])} part, s0 1 - part",
        1 => $"s0 n/4, s1 1 - n/4",
        _ => $"s{random.Next(states[item])}",
    };

    private string Place()
    {
        var item = random.Next(counts.Length);
        return $"u{item}.s{random.Next(states[item])}";
    }

    private string Rate() => random.Next(5) switch
    {
        0 => "fast",
        1 => "slow",
        2 => $"slow * (1 + {Place()})",
        3 => $"fast/(1 + {Place()})",
        _ => "slow * n",
    };

    private string Condition() => random.Next(4) switch
    {
        0 => $" when {Place()} {Comparisons[random.Next(6)]} {random.Next(3)}",
        1 => $" when n {Comparisons[random.Next(6)]} {random.Next(4)} or {Place()} > 1",
        2 => $" when not ({Place()} = {random.Next(3)} and n > 0)",
        _ => "",
    };

    /// <summary>Lines for each place once at most; where a move leaves the same place they may be skipped or take what is left.</summary>
    private string Effects(int item, int from)
    {
        var lines = new List<string> { random.Next(3) switch { 0 => "n = min(n + 1, 3)", 1 => "n = max(n - 1, 0)", _ => "n = 3 - n" } };
        foreach (var place in Enumerable.Range(0, random.Next(3)).Select(_ => (Item: random.Next(counts.Length), State: random.Next(2))).Distinct())
        {
            var amount = random.Next(4) switch { 0 => "all", 1 => "x n if any", 2 => "x 2 if any", _ => "if any" };
            lines.Add($"u{place.Item}: s{place.State} -> {Targets(place.Item)} {amount}");
        }

        return string.Join(" ; ", lines.Skip(item < 0 || random.Next(2) == 0 ? 0 : 1).DefaultIfEmpty($"u{Math.Max(item, 0)}: s{Math.Max(from, 0)} -> s1 if any"));
    }
}
