using ChainSolve.Tests.Checks;
using ChainSolve.Tests.Shared.Chains;
using ChainSolve.Tests.Shared.Checks;
using ChainSolve.Tests.Shared.Reference;

namespace ChainSolve.Tests.Properties;

/// <summary>The measures of the notation on a random chain, each with its true value from the slow reference.</summary>
internal static class MeasureTruths
{
    /// <summary>The measure that fails where the condition never holds in the long run.</summary>
    public const string MeanSpell = "mean_spell";

    private const double Share = 0.3;

    /// <summary>Values below this need not be told from zero.</summary>
    private const double Negligible = 1e-290;

    /// <summary>A condition that holds in about half of the states; never in none.</summary>
    private static int[] Inside(RandomChain chain) => [.. Enumerable.Range(0, chain.Count).Where(i => i % 2 == chain.Moves.Count % 2 || chain.Count == 1)];

    public static string Text(RandomChain chain)
    {
        var condition = string.Join(" or ", Inside(chain).Select(i => $"unit is s{i}"));
        var rates = string.Join("; ", chain.Rewards.Select((r, i) => $"rate {RandomChain.Number(r)} while unit is s{i}"));
        var t = RandomChain.Number(chain.Time);
        return $$"""
            {{chain.ToText()}}
            let inside = {{condition}}
            reward earned { {{rates}} }
            measure probability_at = probability inside at {{t}}
            measure probability_steady = probability inside steady
            measure expected_at = expected earned at {{t}}
            measure expected_steady = expected earned steady
            measure total_over = total earned over {{t}}
            measure average_over = average earned over {{t}}
            measure average_condition = average inside over {{t}}
            measure reliability_over = reliability inside over {{t}}
            measure onset_over = onset inside over {{t}}
            measure entries_at = entries inside at {{t}}
            measure entries_over = entries inside over {{t}}
            measure entries_steady = entries inside steady
            measure total_until = total earned until inside
            measure mean_time = mean time to inside
            measure deviation_time = deviation time to inside
            measure quantile_time = quantile {{RandomChain.Number(Share)}} time to inside
            measure {{MeanSpell}} = mean spell inside steady

            """;
    }

    /// <summary>Says what is wrong with the values; empty if each true value lies within the bound.</summary>
    public static IEnumerable<string> Faults(RandomChain chain, SolvedText solved)
    {
        Bounded value(string name) => solved.Single(name);
        var reference = chain.Reference;
        var inside = Inside(chain);
        var mask = Enumerable.Range(0, chain.Count).Select(inside.Contains).ToArray();
        var flow = new double[chain.Count];
        foreach (var (from, to, rate) in chain.Moves)
        {
            flow[from] += !mask[from] && mask[to] ? rate : 0;
        }

        // Rates into the condition are added in doubles above; the exact sum decides, so chains are compared with a little room.
        var room = 4e-16 * chain.Count;
        var ones = mask.Select(m => m ? 1.0 : 0).ToArray();
        var path = reference.DistributionAndTotals(chain.Start, chain.Time, [chain.Rewards, ones, flow]);
        var limit = reference.Limit(chain.Start);
        var stopped = new ReferenceChain(chain.Count, chain.Moves.Where(m => !mask[m.From]));
        var staying = reference.Distribution(chain.Start, chain.Time, mask);
        var at = path[..chain.Count];

        var truths = new List<(string Name, BigFloat Truth)>
        {
            ("probability_at", Dot(at, ones)),
            ("probability_steady", Dot(limit, ones)),
            ("expected_at", Dot(at, chain.Rewards)),
            ("expected_steady", Dot(limit, chain.Rewards)),
            ("total_over", path[chain.Count]),
            ("average_over", path[chain.Count] / chain.Time),
            ("average_condition", path[chain.Count + 1] / chain.Time),
            ("reliability_over", Dot(staying, ones)),
            ("onset_over", Dot(stopped.Distribution(chain.Start, chain.Time), ones)),
            ("entries_at", Dot(at, flow)),
            ("entries_over", path[chain.Count + 2]),
            ("entries_steady", Dot(limit, flow)),
        };
        foreach (var (name, truth) in truths)
        {
            if (Differs(value(name), truth, room) is { } fault)
            {
                yield return $"{name}: {fault}";
            }
        }

        if (SpellFault(solved, Dot(limit, ones), Dot(limit, flow), room) is { } spell)
        {
            yield return $"{MeanSpell}: {spell}";
        }

        foreach (var fault in FirstPassageFaults(chain, stopped, inside, ones, value))
        {
            yield return fault;
        }
    }

    /// <summary>A spell has no mean where the condition never holds, and no end where it holds and is not entered.</summary>
    private static string? SpellFault(SolvedText solved, BigFloat held, BigFloat entered, double room)
    {
        if (held.IsZero || !solved.Values.ContainsKey(MeanSpell))
        {
            return held.IsZero == !solved.Values.ContainsKey(MeanSpell) ? null : $"holds for {held} of the time";
        }

        var spell = solved.Single(MeanSpell);
        return !entered.IsZero ? Differs(spell, held / entered, room)
            : double.IsPositiveInfinity(spell.Value) ? null
            : $"{spell}, never entered";
    }

    private static IEnumerable<string> FirstPassageFaults(
        RandomChain chain, ReferenceChain stopped, int[] inside, double[] ones, Func<string, Bounded> value)
    {
        var reach = stopped.Reachable();
        var starts = Enumerable.Range(0, chain.Count).Where(i => chain.Start[i] > 0).ToArray();
        var isSure = starts.All(i => Enumerable.Range(0, chain.Count).All(j => !reach[i, j] || inside.Any(k => reach[j, k])));
        if (isSure)
        {
            // States that the start does not lead to are merged with the target, so that all that remain are left for good.
            var target = Enumerable.Range(0, chain.Count).Where(j => inside.Contains(j) || !starts.Any(i => reach[i, j])).ToArray();
            var mean = stopped.Moment(chain.Start, target, 1);
            if (Differs(value("mean_time"), mean, 0) is { } fault)
            {
                yield return $"mean_time: {fault}";
            }

            if (Differs(value("total_until"), stopped.TotalUntil(chain.Start, target, chain.Rewards), 0) is { } earned)
            {
                yield return $"total_until: {earned}";
            }

            var variance = stopped.Moment(chain.Start, target, 2) - (mean * mean);
            var deviation = value("deviation_time");
            var (low, high) = Ends(deviation);
            if (!(low <= BigFloat.Zero || low * low <= variance) || high * high < variance)
            {
                yield return $"deviation_time: {deviation} against a variance of {variance}";
            }
        }
        else if (!double.IsPositiveInfinity(value("mean_time").Value))
        {
            yield return $"mean_time: {value("mean_time")}, but the condition may never be met";
        }

        var ever = stopped.EndsIn(chain.Start, inside);
        var quantile = value("quantile_time");
        if (ever < Share)
        {
            if (!double.IsPositiveInfinity(quantile.Value))
            {
                yield return $"quantile_time: {quantile}, but the condition is met with chance {ever} only";
            }
        }
        else if (double.IsFinite(quantile.Value))
        {
            var (low, high) = Ends(quantile);
            var below = low <= BigFloat.Zero ? BigFloat.Zero : Dot(stopped.Distribution(chain.Start, low.ToDouble()), ones);
            var above = Dot(stopped.Distribution(chain.Start, high.ToDouble()), ones);
            if (low > BigFloat.Zero && below > Share * (1 + 1e-15) || above < Share * (1 - 1e-15))
            {
                yield return $"quantile_time: {quantile}, reached with chances {below} .. {above}";
            }
        }
    }

    private static (BigFloat Low, BigFloat High) Ends(Bounded value) => ((BigFloat)value.Value - value.Bound, (BigFloat)value.Value + value.Bound);

    private static BigFloat Dot(BigFloat[] vector, double[] rewards) =>
        rewards.Select((r, i) => r * vector[i]).Aggregate(BigFloat.Zero, (s, x) => s + x);

    private static string? Differs(Bounded value, BigFloat truth, double room)
    {
        if (truth.IsZero)
        {
            return value is { Value: 0, Bound: 0 } ? null : $"{value}, zero by structure";
        }

        if (!double.IsFinite(value.Value))
        {
            return $"{value}, true {truth}";
        }

        var error = (value.Value - truth).Abs;
        return error <= value.Bound + (truth.Abs * room) || error <= Negligible ? null : $"{value}, true {truth}, error {error}";
    }
}
