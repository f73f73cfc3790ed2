using System.Globalization;
using System.Text;
using ChainSolve.Tests.Shared.Reference;

namespace ChainSolve.Tests.Shared.Chains;

/// <summary>A chain made up for a test. Its text is a model in the notation, so that a failing test shows a model to try.</summary>
public sealed record RandomChain
{
    /// <summary>The kind of structure it was made with.</summary>
    public required string Shape { get; init; }

    public required int Count { get; init; }

    public required IReadOnlyList<(int From, int To, double Rate)> Moves { get; init; }

    /// <summary>The start distribution.</summary>
    public required double[] Start { get; init; }

    /// <summary>A time that suits the chain.</summary>
    public required double Time { get; init; }

    /// <summary>One non-negative reward a state.</summary>
    public required double[] Rewards { get; init; }

    /// <summary>The largest exit rate times the time.</summary>
    public double RateTime => Reference.MaxExitRate * Time;

    internal ReferenceChain Reference => new(Count, Moves);

    /// <summary>Writes a double so that it is read back as the same.</summary>
    public static string Number(double value) => value.ToString("R", CultureInfo.InvariantCulture).Replace("E", "e", StringComparison.Ordinal);

    /// <summary>The item of the chain in the notation, without measures.</summary>
    public string ToText()
    {
        var text = new StringBuilder();
        text.Append("item unit {\n    states ").AppendJoin(", ", Enumerable.Range(0, Count).Select(i => $"s{i}")).Append('\n');
        var starts = Enumerable.Range(0, Count).Where(i => Start[i] > 0).ToArray();
        text.Append("    start ").AppendJoin(", ", starts.Select(i => starts.Length == 1 ? $"s{i}" : $"s{i} {Number(Start[i])}")).Append('\n');
        foreach (var (from, to, rate) in Moves)
        {
            text.Append(CultureInfo.InvariantCulture, $"    s{from} -> s{to} at {Number(rate)}\n");
        }

        return text.Append("}\n").ToString();
    }

    public override string ToString() =>
        $"\n# {Shape}, t = {Number(Time)}, q t = {RateTime:G3}, rewards {string.Join(' ', Rewards.Select(Number))}\n{ToText()}";

    /// <summary>Simpler chains: without a state, without a move, and with rounder numbers.</summary>
    public IEnumerable<RandomChain> Shrink()
    {
        for (var i = Count - 1; i >= 0 && Count > 1; i--)
        {
            yield return Without(i);
        }

        for (var m = 0; m < Moves.Count; m++)
        {
            var at = m;
            yield return this with { Moves = [.. Moves.Where((_, k) => k != at)] };
        }

        for (var m = 0; m < Moves.Count; m++)
        {
            var at = m;
            if (Moves[m].Rate != Rounder(Moves[m].Rate))
            {
                yield return this with { Moves = [.. Moves.Select((x, k) => k == at ? (x.From, x.To, Rounder(x.Rate)) : x)] };
            }
        }

        if (Time != Rounder(Time))
        {
            yield return this with { Time = Rounder(Time) };
        }

        if (Start.Count(p => p > 0) > 1)
        {
            var first = Array.FindIndex(Start, p => p > 0);
            yield return this with { Start = [.. Start.Select((_, i) => i == first ? 1.0 : 0.0)] };
        }
    }

    private static double Rounder(double value) =>
        value == 0 ? 0 : double.Parse(value.ToString("E0", CultureInfo.InvariantCulture), CultureInfo.InvariantCulture);

    private RandomChain Without(int state)
    {
        int Moved(int i) => i > state ? i - 1 : i;
        double[] Rest(double[] values) => [.. values.Where((_, i) => i != state)];
        var start = Rest(Start);
        var mass = start.Sum();
        return this with
        {
            Count = Count - 1,
            Moves = [.. Moves.Where(m => m.From != state && m.To != state).Select(m => (Moved(m.From), Moved(m.To), m.Rate))],
            Start = mass > 0 ? [.. start.Select(p => p / mass)] : [.. start.Select((_, i) => i == 0 ? 1.0 : 0.0)],
            Rewards = Rest(Rewards),
        };
    }
}
