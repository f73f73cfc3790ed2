using ChainSolve.Tests.Shared.Checks;
using ChainSolve.Tests.Shared.Reference;

namespace ChainSolve.Numerics.Tests.Reference;

/// <summary>Answers the questions of the files of checks with the slow reference; null where it cannot.</summary>
internal static class ReferenceAnswers
{
    public static BigFloat? Answer(CheckCase check)
    {
        if (check.Chain is null)
        {
            return null;
        }

        var chain = ConcreteChain.From(check.Chain);
        if (chain.Count > 25)
        {
            return null;
        }

        var ask = check.Ask;
        var reference = new ReferenceChain(chain.Count, chain.Moves);
        var of = ask.Of is null && ask.Levels is null ? [] : chain.Select(ask.Of, ask.Levels);
        var to = ask.To is null ? [] : chain.Select(ask.To, null);
        var rewards = ask.Rewards is { } element ? chain.Rewards(element) : [];
        BigFloat? value = ask.What switch
        {
            "probability" or "offered-traffic" => Sum(ask.At is { } t ? reference.Distribution(chain.Start, t) : reference.Limit(chain.Start), of),
            "expected" => Dot(ask.At is { } t ? reference.Distribution(chain.Start, t) : reference.Limit(chain.Start), rewards),
            "ratio" => Dot(reference.Limit(chain.Start), rewards) / Dot(reference.Limit(chain.Start), chain.Rewards(ask.OverRewards!.Value)),
            "total" => SignedTotal(reference, chain, rewards, ask.Over!.Value),
            "average" => SignedTotal(reference, chain, rewards, ask.Over!.Value) / ask.Over!.Value,
            "mean-time" => reference.Moment(chain.Start, to, 1),
            "moment" => reference.Moment(chain.Start, to, ask.Order!.Value),
            "total-until" => reference.TotalUntil(chain.Start, to, rewards),
            "ends-in" => reference.EndsIn(chain.Start, of),
            "density" => Flow(reference.Distribution(chain.Start, ask.At!.Value), chain, to),
            "frequency" => Flow(reference.Limit(chain.Start), chain, of),
            "mean-spell" => Sum(reference.Limit(chain.Start), of) / Flow(reference.Limit(chain.Start), chain, of),
            _ => null,
        };
        return value is { } v ? v * ask.Scale : null;
    }

    private static BigFloat SignedTotal(ReferenceChain reference, ConcreteChain chain, double[] rewards, double time)
    {
        var parts = reference.Totals(chain.Start, time, [[.. rewards.Select(r => Math.Max(r, 0))], [.. rewards.Select(r => Math.Max(-r, 0))]]);
        return parts[0] - parts[1];
    }

    private static BigFloat Sum(BigFloat[] vector, int[] states) => states.Aggregate(BigFloat.Zero, (s, i) => s + vector[i]);

    private static BigFloat Dot(BigFloat[] vector, double[] rewards) =>
        rewards.Select((r, i) => r * vector[i]).Aggregate(BigFloat.Zero, (s, x) => s + x);

    private static BigFloat Flow(BigFloat[] vector, ConcreteChain chain, int[] into) =>
        chain.Moves.Where(m => !into.Contains(m.From) && into.Contains(m.To)).Aggregate(BigFloat.Zero, (s, m) => s + (vector[m.From] * m.Rate));
}
