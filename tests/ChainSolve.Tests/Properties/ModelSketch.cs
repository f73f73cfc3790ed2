using System.Globalization;
using System.Text;
using ChainSolve.Tests.Shared.Chains;

namespace ChainSolve.Tests.Properties;

/// <summary>
/// A random small model of one kind of item, some of it repaired by a crew, that can be written in several ways which must give the
/// same answers. Its text is what a failing test shows.
/// </summary>
public sealed record ModelSketch
{
    /// <summary>The number of like items.</summary>
    public required int Units { get; init; }

    /// <summary>The number of states of each.</summary>
    public required int States { get; init; }

    public required IReadOnlyList<(int From, int To, double Rate, bool ByCrew)> Moves { get; init; }

    public required int CrewSize { get; init; }

    public required double Time { get; init; }

    public override string ToString() => "\n" + AsReplicas();

    /// <summary>With replicas of which only the numbers in each state are kept.</summary>
    public string AsReplicas() => Crew("fitter") + Item($"unit x {Units}", Names("s"), "fitter", Moves) + Measures(s => $"unit.s{s}", "");

    /// <summary>With an item of its own for every unit.</summary>
    public string AsSeparateItems()
    {
        var units = Enumerable.Range(0, Units).Select(u => $"unit{u}").ToArray();
        return Crew("fitter") + Item(string.Join(", ", units), Names("s"), "fitter", Moves)
            + Measures(s => "(" + string.Join(" + ", units.Select(u => $"{u}.s{s}")) + ")", "");
    }

    /// <summary>The same replicas under other names, with states, moves and statements in another order.</summary>
    public string Renamed()
    {
        var names = Names("other");
        var order = Enumerable.Range(0, States).Reverse().Select(s => names[s]);
        var item = Item($"thing x {Units}", names, "team", [.. Moves.Reverse()], $"    states {string.Join(", ", order)}\n    start {names[0]} {Units}\n");
        return Measures(s => $"thing.{names[s]}", "z") + item + Crew("team");
    }

    /// <summary>Another unit of time: every rate divided by a factor, every time multiplied.</summary>
    public ModelSketch Slower(double factor) => this with
    {
        Moves = [.. Moves.Select(m => (m.From, m.To, m.Rate / factor, m.ByCrew))],
        Time = Time * factor,
    };

    public IEnumerable<ModelSketch> Shrink()
    {
        if (Units > 1)
        {
            yield return this with { Units = Units - 1 };
        }

        for (var m = 0; m < Moves.Count && Moves.Count > 1; m++)
        {
            var at = m;
            yield return this with { Moves = [.. Moves.Where((_, k) => k != at)] };
        }

        for (var m = 0; m < Moves.Count; m++)
        {
            var at = m;
            if (Moves[m].ByCrew)
            {
                yield return this with { Moves = [.. Moves.Select((x, k) => k == at ? x with { ByCrew = false } : x)] };
            }

            if (Moves[m].Rate != 1)
            {
                yield return this with { Moves = [.. Moves.Select((x, k) => k == at ? x with { Rate = 1 } : x)] };
            }
        }

        if (Time != 1)
        {
            yield return this with { Time = 1 };
        }
    }

    private string Crew(string name) => Moves.Any(m => m.ByCrew) ? $"crew {name} = {CrewSize}\n" : "";

    private string[] Names(string stem) => [.. Enumerable.Range(0, States).Select(s => stem + s.ToString(CultureInfo.InvariantCulture))];

    private static string Item(string head, string[] names, string crew, IReadOnlyList<(int From, int To, double Rate, bool ByCrew)> moves, string? lead = null)
    {
        var text = new StringBuilder($"item {head} {{\n").Append(lead ?? $"    states {string.Join(", ", names)}\n");
        foreach (var (from, to, rate, byCrew) in moves)
        {
            text.Append(CultureInfo.InvariantCulture, $"    {names[from]} -> {names[to]} at {RandomChain.Number(rate)}{(byCrew ? " by " + crew : "")}\n");
        }

        return text.Append("}\n").ToString();
    }

    /// <summary>Measures that see the numbers in each state only; names sort the same with any prefix.</summary>
    private string Measures(Func<int, string> number, string prefix)
    {
        var most = (Units + 1) / 2;
        var last = number(States - 1);
        var time = RandomChain.Number(Time);
        return $$"""
            reward {{prefix}}loss { rate 2 * {{last}}; rate 0.5 while {{number(0)}} = 0 }
            measure {{prefix}}a = probability {{last}} >= {{most}} at {{time}}, {{RandomChain.Number(Time / 16)}}
            measure {{prefix}}b = expected {{prefix}}loss at {{time}}
            measure {{prefix}}c = total {{prefix}}loss over {{time}}
            measure {{prefix}}d = onset {{last}} >= {{most}} over {{time}}
            measure {{prefix}}e = entries {{number(0)}} = 0 over {{time}}
            measure {{prefix}}f = expected {{prefix}}loss steady
            measure {{prefix}}g = mean time to {{last}} >= {{most}}

            """;
    }
}
