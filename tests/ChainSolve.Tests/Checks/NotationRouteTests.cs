using ChainSolve.Tests.Shared.Checks;

namespace ChainSolve.Tests.Checks;

/// <summary>Every value from outside through a model in the notation; chains that follow a rule also with replicas, crews and counters.</summary>
public class NotationRouteTests
{
    /// <summary>Questions that the notation does not ask, and third and fourth moments.</summary>
    private static readonly string[] OtherIds = ["drunkard-condmean", "erlang20-m3", "erlang20-m4", "hyper2-m3"];

    public static TheoryData<string> Chains =>
        [.. CheckFiles.All.Where(c => c.Chain is not null && !OtherIds.Contains(c.Id)).Select(c => c.Id)];

    public static TheoryData<string> Twins => [.. CheckFiles.All.Where(c => c.Twin is not null).Select(c => c.Id)];

    [Fact]
    public void Files_OfAllCases_LeaveOutNothing()
    {
        Assert.Equal(143 - OtherIds.Length, Chains.Count);
        Assert.True(Twins.Count >= 30, $"Only {Twins.Count} chains are written in a second way.");
    }

    [Theory]
    [MemberData(nameof(Chains))]
    public void Model_OfACase_HasItsDigits(string id)
    {
        var check = CheckFiles.Find(id);
        Holds(check, check.Chain!);
    }

    [Theory]
    [MemberData(nameof(Twins))]
    public void Model_WithReplicasOrCounters_HasTheSameDigits(string id)
    {
        var check = CheckFiles.Find(id);
        Holds(check, check.Twin!);
    }

    private static void Holds(CheckCase check, CheckChain chain)
    {
        var model = CheckModel.Write(check, chain)!;
        var solved = SolvedText.Solve(model.Text);
        CheckVerdict.Holds(check, model.Combine(name => solved.Single(name)));
    }
}
