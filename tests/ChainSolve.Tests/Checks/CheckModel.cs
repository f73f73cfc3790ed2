using ChainSolve.Tests.Shared.Chains;
using ChainSolve.Tests.Shared.Checks;

namespace ChainSolve.Tests.Checks;

/// <summary>A case as a model in the notation, and how its answer is made from the measures.</summary>
/// <param name="Text">The model.</param>
/// <param name="Combine">Takes the value of a measure by name and gives the answer.</param>
internal sealed record CheckModel(string Text, Func<Func<string, Bounded>, Bounded> Combine)
{
    /// <summary>Writes the model; null for a question that the notation does not ask.</summary>
    public static CheckModel? Write(CheckCase check, CheckChain source)
    {
        var chain = ConcreteChain.From(source);
        var wording = ChainWording.Of(source, chain);
        var ask = check.Ask;
        var of = ask.Of is null && ask.Levels is null ? "" : wording.Condition(chain.Select(ask.Of, ask.Levels));
        var to = ask.To is null ? "" : wording.Condition(chain.Select(ask.To, null));
        var at = ask.At is { } t ? $"at {RandomChain.Number(t)}" : "steady";
        var over = $"over {RandomChain.Number(ask.Over ?? 0)}";

        string Earned(string name, System.Text.Json.JsonElement? rewards) =>
            $"reward {name} {{ {wording.Reward(RewardsOf(check, chain, rewards!.Value))} }}\n";

        CheckModel One(string measure, string rewards = "") =>
            new(wording.Body + rewards + $"measure answer = {measure}\n", value => value("answer") * ask.Scale);

        return ask.What switch
        {
            "probability" or "offered-traffic" => One($"probability {of} {at}"),
            "expected" => One($"expected earned {at}", Earned("earned", ask.Rewards)),
            "total" => One($"total earned {over}", Earned("earned", ask.Rewards)),
            "average" => One($"average earned {over}", Earned("earned", ask.Rewards)),
            "total-until" => One($"total earned until {to}", Earned("earned", ask.Rewards)),
            "mean-time" => One($"mean time to {to}"),
            "moment" when ask.Order == 1 => One($"mean time to {to}"),
            "moment" when ask.Order == 2 => new(
                $"{wording.Body}measure centre = mean time to {to}\nmeasure width = deviation time to {to}\n",
                value => (value("centre") * value("centre")) + (value("width") * value("width"))),
            "quantile" => One($"quantile {RandomChain.Number(ask.Share!.Value)} time to {to}"),
            "density" => One($"entries {to} {at}"),
            "ends-in" => One($"probability {of} steady"),
            "frequency" => One($"entries {of} steady"),
            "mean-spell" => One($"mean spell {of} steady"),
            "ratio" => new(
                $"{wording.Body}{Earned("above", ask.Rewards)}{Earned("below", ask.OverRewards)}" +
                "measure m_above = expected above steady\nmeasure m_below = expected below steady\n",
                value => value("m_above") / value("m_below")),
            "kemeny" => Kemeny(chain, wording, ask.From!),
            _ => null,
        };
    }

    /// <summary>Rewards by state name belong to the chain of the case; a twin has them by level, in the same order of states.</summary>
    private static double[] RewardsOf(CheckCase check, ConcreteChain chain, System.Text.Json.JsonElement rewards) =>
        rewards.ValueKind == System.Text.Json.JsonValueKind.String || chain.Names.Any(n => rewards.TryGetProperty(n, out _))
            ? chain.Rewards(rewards)
            : throw new InvalidDataException($"The rewards of {check.Id} name no state of the chain.");

    private static CheckModel Kemeny(ConcreteChain chain, ChainWording wording, string from)
    {
        var others = Enumerable.Range(0, chain.Count).Where(i => chain.Names[i] != from).ToArray();
        var text = wording.Body + string.Concat(others.Select(i =>
            $"measure time{i} = mean time to {wording.Condition([i])}\nmeasure share{i} = probability {wording.Condition([i])} steady\n"));
        return new CheckModel(text, value => others.Aggregate((Bounded)0, (sum, i) => sum + (value($"time{i}") * value($"share{i}"))));
    }
}
