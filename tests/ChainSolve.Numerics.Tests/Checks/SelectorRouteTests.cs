using ChainSolve.Numerics.Absorption;
using ChainSolve.Numerics.Estimates;
using ChainSolve.Numerics.Stationary;
using ChainSolve.Tests.Shared.Checks;

namespace ChainSolve.Numerics.Tests.Checks;

/// <summary>Long-run and first-passage cases where the library chooses the method and splits the chain into classes by itself.</summary>
public class SelectorRouteTests
{
    private static readonly string[] LongRunAsks = ["probability", "expected", "ratio", "frequency", "mean-spell", "offered-traffic", "ends-in"];

    private static readonly string[] PassageAsks = ["mean-time", "moment", "total-until"];

    public static TheoryData<string> LongRunIds => [.. Cases(LongRunAsks).Select(c => c.Id)];

    public static TheoryData<string> PassageIds => [.. Cases(PassageAsks).Select(c => c.Id)];

    public static TheoryData<string> TwinIds => [.. Cases(LongRunAsks).Where(c => c.Twin is not null).Select(c => c.Id)];

    [Theory]
    [MemberData(nameof(LongRunIds))]
    public void LongRun_ACase_HasItsDigits(string id)
    {
        var check = CheckFiles.Find(id);
        CheckVerdict.Holds(check, Answer(check, check.Chain!));
    }

    [Theory]
    [MemberData(nameof(TwinIds))]
    public void LongRun_ACaseGivenByARule_HasItsDigits(string id)
    {
        var check = CheckFiles.Find(id);
        CheckVerdict.Holds(check, Answer(check, check.Twin!));
    }

    [Theory]
    [MemberData(nameof(PassageIds))]
    public void FirstPassage_ACase_HasItsDigits(string id)
    {
        var check = CheckFiles.Find(id);
        var chain = ConcreteChain.From(check.Chain!);
        var end = chain.Select(check.Ask.To, null);
        bool[] alive = [.. Enumerable.Range(0, chain.Count).Select(i => !end.Contains(i))];
        var result = FirstPassage.Solve(NumericsAnswers.Build(chain), chain.Start, alive, check.Ask.Order ?? 1);
        var value = check.Ask.What switch
        {
            "mean-time" => result.MeanTime,
            "moment" => result.Moment(check.Ask.Order!.Value),
            _ => result.Reward(chain.Rewards(check.Ask.Rewards!.Value)),
        };

        Assert.NotEmpty(result.Why);
        CheckVerdict.Holds(check, Bounded(value));
    }

    private static IEnumerable<CheckCase> Cases(string[] asks) =>
        CheckFiles.All.Where(c => c.Chain is not null && c.Ask is { At: null, Over: null } && asks.Contains(c.Ask.What));

    private static Bounded Answer(CheckCase check, CheckChain source)
    {
        var chain = ConcreteChain.From(source);
        var result = LongRun.Solve(NumericsAnswers.Build(chain), chain.Start);
        var ask = check.Ask;
        var of = ask.Of is null && ask.Levels is null ? [] : chain.Select(ask.Of, ask.Levels);
        bool[] set = [.. Enumerable.Range(0, chain.Count).Select(i => of.Contains(i))];
        var flow = new double[chain.Count];
        foreach (var (from, to, rate) in chain.Moves)
        {
            flow[from] += set[to] && !set[from] ? rate : 0;
        }

        Assert.NotEmpty(result.Why);
        var value = ask.What switch
        {
            "expected" => Bounded(result.Expected(chain.Rewards(ask.Rewards!.Value))),
            "ratio" => Bounded(result.Expected(chain.Rewards(ask.Rewards!.Value))) / Bounded(result.Expected(chain.Rewards(ask.OverRewards!.Value))),
            "frequency" => Bounded(result.Expected(flow)),
            "mean-spell" => Bounded(result.Probability(set)) / Bounded(result.Expected(flow)),
            _ => Bounded(result.Probability(set)),
        };
        return value * ask.Scale;
    }

    private static Bounded Bounded(Estimate value) => new(value.Value, value.Bound);
}
