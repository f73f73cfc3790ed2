namespace ChainSolve.Tests.StateSpace;

/// <summary>What items, crews and moves mean: whole chains, written out by hand.</summary>
public class ItemMeaningTests
{
    [Fact]
    public void Replicas_FiftyOfTwoStates_AreFiftyOneStates()
    {
        var chain = ExploredText.Explore("item pump x 50 { up -> down at 1; down -> up at 2 }");
        Assert.Equal((51, 100), (chain.States.Count, chain.Generator.TransitionCount));
    }

    [Fact]
    public void Move_RateIsOfOneReplica() => ExploredText.Has(
        "item u x 2 { a -> b at 3; b -> a at 5 }",
        "u: a 2 -> u: a 1, b 1 at 6",
        "u: a 1, b 1 -> u: b 2 at 3",
        "u: a 1, b 1 -> u: a 2 at 5",
        "u: b 2 -> u: a 1, b 1 at 10");

    [Fact]
    public void Move_ReplicaThatMovesIsCounted() => ExploredText.Has(
        "item u x 2 { a -> b at 10 * u.a }",
        "u: a 2 -> u: a 1, b 1 at 40",
        "u: a 1, b 1 -> u: b 2 at 10");

    [Fact]
    public void Moves_TwoOfTheSameKind_AddUp() => ExploredText.Has("item u { a -> b at 1; a -> b at 2 }", "u: a -> u: b at 3");

    [Fact]
    public void Move_ToItself_ChangesNothing() => ExploredText.Has("item u { a -> a at 7; a -> b at 2 }", "u: a -> u: b at 2");

    [Fact]
    public void Move_When_IsPossibleWhereTheConditionHolds() => ExploredText.Has(
        "item u { a -> b at 1 when v is y; b -> a at 1 }\nitem v { x -> y at 2 }",
        "u: a; v: x -> u: a; v: y at 2",
        "u: a; v: y -> u: b; v: y at 1",
        "u: b; v: y -> u: a; v: y at 1");

    [Fact]
    public void Move_AfterAMean_HasItsInverseAsRate() => ExploredText.Has("item u { a -> b after mean 4 }", "u: a -> u: b at 0.25");

    [Fact]
    public void Move_ZeroRate_IsNotThere() => ExploredText.Has("item u { a -> b at 0; a -> c at 1 }", "u: a -> u: c at 1");

    [Fact]
    public void Move_DrawnTarget_SplitsItsRate() => ExploredText.Has(
        "item u x 2 { a -> b 0.25, c 0.75 at 4 }",
        "u: a 2 -> u: a 1, b 1 at 2",
        "u: a 2 -> u: a 1, c 1 at 6",
        "u: a 1, b 1 -> u: b 2 at 1",
        "u: a 1, b 1 -> u: b 1, c 1 at 3",
        "u: a 1, c 1 -> u: b 1, c 1 at 1",
        "u: a 1, c 1 -> u: c 2 at 3");

    [Fact]
    public void Move_DrawnTargetsThatNearlyAddToOne_AreNormalised()
    {
        var rates = ExploredText.Transitions("item u { a -> b 0.3333333333, c 0.6666666666 at 3 }").Select(t => double.Parse(t.Split(" at ")[1], System.Globalization.CultureInfo.InvariantCulture));
        Assert.Equal(3, rates.Sum(), 1e-15);
    }

    [Fact]
    public void Item_NoReplica_IsThereAndDoesNothing() => ExploredText.Has("item u x 0 { a -> b at 1 }\nitem v { x -> y at 1 }", "v: x -> v: y at 1");

    [Fact]
    public void Items_SeveralWithOneBody_AreApartWithTheirOwnLocals() => ExploredText.Has(
        "item u x 2 (r = 3), v (r = u.a + 10) { a -> b at r }",
        "u: a 2; v: a -> u: a 1, b 1; v: a at 6",
        "u: a 2; v: a -> u: a 2; v: b at 12",
        "u: a 1, b 1; v: a -> u: b 2; v: a at 3",
        "u: a 1, b 1; v: a -> u: a 1, b 1; v: b at 11",
        "u: b 2; v: a -> u: b 2; v: b at 10",
        "u: a 2; v: b -> u: a 1, b 1; v: b at 6",
        "u: a 1, b 1; v: b -> u: b 2; v: b at 3");

    [Fact]
    public void Start_Nothing_IsTheFirstState() => Assert.Equal(["u: a"], ExploredText.Start("item u { a -> b at 1 }").Select(s => s.Split(" (")[0]));

    [Fact]
    public void Start_States_FixTheFirst() => Assert.Equal(["u: b (1)"], ExploredText.Start("item u { states b, a; a -> b at 1; b -> a at 1 }"));

    [Fact]
    public void Start_Replicas_AreCounts() => Assert.Equal(["u: a 2, b 1 (1)"], ExploredText.Start("item u x 3 { start a 2, b 1; a -> b at 1; b -> a at 1 }"));

    [Fact]
    public void Start_Probabilities_OfSeveralItemsMultiply() => Assert.Equal(
        ["u: a; v: a (0.125)", "u: a; v: b (0.125)", "u: b; v: a (0.375)", "u: b; v: b (0.375)"],
        ExploredText.Start("item u { start a 0.25, b 0.75; a -> b at 1; b -> a at 1 }\nitem v { start a 0.5, b 0.5; a -> b at 1; b -> a at 1 }"));

    [Fact]
    public void Crew_FewerThanJobs_SharesItself() => ExploredText.Has(
        "crew c = 2\nitem u x 3 { start b 3; b -> a at 6 by c }",
        "u: b 3 -> u: b 2, a 1 at 12",
        "u: b 2, a 1 -> u: b 1, a 2 at 12",
        "u: b 1, a 2 -> u: a 3 at 6");

    [Fact]
    public void Crew_JobsOfSeveralItems_ShareItAlike() => ExploredText.Has(
        "crew c = 1\nitem u { b -> a at 6 by c }\nitem v { b -> a at 2 by c }",
        "u: b; v: b -> u: a; v: b at 3",
        "u: b; v: b -> u: b; v: a at 1",
        "u: a; v: b -> u: a; v: a at 2",
        "u: b; v: a -> u: a; v: a at 6");

    [Fact]
    public void Crew_SeveralMovesOfOneReplica_AreOneJob() => ExploredText.Has(
        "crew c = 1\nitem u x 2 { start b 2; b -> a at 6 by c; b -> z at 4 by c }",
        "u: b 2 -> u: b 1, a 1 at 6",
        "u: b 2 -> u: b 1, z 1 at 4",
        "u: b 1, a 1 -> u: a 2 at 6",
        "u: b 1, a 1 -> u: a 1, z 1 at 4",
        "u: b 1, z 1 -> u: a 1, z 1 at 6",
        "u: b 1, z 1 -> u: z 2 at 4");

    [Fact]
    public void Crew_MoveThatIsNotEnabledOrHasNoRate_IsNoJob() => ExploredText.Has(
        "crew c = 1\nitem u { b -> a at 6 by c }\nitem v { b -> a at 2 when u is a by c }\nitem w { b -> a at 0 by c }",
        "u: b; v: b; w: b -> u: a; v: b; w: b at 6",
        "u: a; v: b; w: b -> u: a; v: a; w: b at 2");

    [Fact]
    public void Crew_Ranked_ServesTheLowestNumberFirst() => ExploredText.Has(
        "crew c = 2 ranked\nitem u { b -> a at 6 by c rank 2 }\nitem v x 2 { start b 2; b -> a at 4 by c rank 1 }",
        "u: b; v: b 2 -> u: b; v: b 1, a 1 at 8",
        "u: b; v: b 1, a 1 -> u: b; v: a 2 at 4",
        "u: b; v: b 1, a 1 -> u: a; v: b 1, a 1 at 6",
        "u: b; v: a 2 -> u: a; v: a 2 at 6",
        "u: a; v: b 1, a 1 -> u: a; v: a 2 at 4");

    [Fact]
    public void Crew_EqualRanks_ShareWhatIsLeft() => ExploredText.Has(
        "crew c = 2 ranked\nitem u { b -> a at 6 by c rank 1 }\nitem v x 2 { start b 2; b -> a at 4 by c rank 5 }",
        "u: b; v: b 2 -> u: a; v: b 2 at 6",
        "u: b; v: b 2 -> u: b; v: b 1, a 1 at 4",
        "u: a; v: b 2 -> u: a; v: b 1, a 1 at 8",
        "u: b; v: b 1, a 1 -> u: a; v: b 1, a 1 at 6",
        "u: b; v: b 1, a 1 -> u: b; v: a 2 at 4",
        "u: a; v: b 1, a 1 -> u: a; v: a 2 at 4",
        "u: b; v: a 2 -> u: a; v: a 2 at 6");

    [Fact]
    public void Effect_OfAMove_HappensInTheSameInstant() => ExploredText.Has(
        "item u { a -> b at 3 { n = n + 1; v: x -> y } }\nitem v { x -> y at 0 }\ncounter n 0 .. 1",
        "u: a; v: x; n = 0 -> u: b; v: y; n = 1 at 3");

    [Fact]
    public void Effect_OfAMoveOfReplicas_HappensOnceAReplica() => ExploredText.Has(
        "item u x 2 { a -> b at 3 { n = n + 1 } }\ncounter n 0 .. 2",
        "u: a 2; n = 0 -> u: a 1, b 1; n = 1 at 6",
        "u: a 1, b 1; n = 1 -> u: b 2; n = 2 at 3");
}
