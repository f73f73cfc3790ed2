namespace ChainSolve.Tests.StateSpace;

/// <summary>What counters, events and their effects mean: whole chains, written out by hand.</summary>
public class EventMeaningTests
{
    private const string Pair = "item u x 2 { a -> b at 0; b -> c at 0 }\n";

    [Fact]
    public void Counter_Nothing_StartsAtItsLowEnd() => Assert.Equal(["n = -2 (1)"], ExploredText.Start("counter n -2 .. 3\nevent e at 1 when n < 3 { n = n + 1 }"));

    [Fact]
    public void Counter_Start_IsWhereItStarts() => Assert.Equal(["n = 1 (1)"], ExploredText.Start("counter n -2 .. 3 start 1\nevent e at 1 when n < 3 { n = n + 1 }"));

    [Fact]
    public void Event_RateIsItsOwn() => ExploredText.Has(Pair + "event e at 3 when u.a > 0 { u: a -> b }", "u: a 2 -> u: a 1, b 1 at 3", "u: a 1, b 1 -> u: b 2 at 3");

    [Fact]
    public void Event_Effects_ReadTheStateBefore() => ExploredText.Has(
        "counter m 0 .. 3 start 1\ncounter n 0 .. 3 start 2\nevent swap at 1 when m < n { m = n; n = m }",
        "m = 1; n = 2 -> m = 2; n = 1 at 1");

    [Fact]
    public void Event_WithoutEffect_LeadsNowhere() => Assert.Empty(ExploredText.Transitions("counter n 0 .. 1\nevent e at 1 { }"));

    [Fact]
    public void Effect_Count_MovesSoMany() => ExploredText.Has(Pair + "event e at 1 when u.a = 2 { u: a -> b x 2 }", "u: a 2 -> u: b 2 at 1");

    [Fact]
    public void Effect_CountFromTheState_MovesSoMany() => ExploredText.Has(
        Pair + "event e at 1 when u.a > 0 { u: a -> c x (u.a) }", "u: a 2 -> u: c 2 at 1");

    [Fact]
    public void Effect_All_IsWhatTheOthersLeave() => ExploredText.Has(
        "item u x 3 { a -> b at 0; b -> c at 0 }\nevent e at 1 when u.a = 3 { u: a -> c all; u: a -> b }", "u: a 3 -> u: b 1, c 2 at 1");

    [Fact]
    public void Effect_AllOfNone_IsNothing() => Assert.Empty(ExploredText.Transitions(Pair + "event e at 1 { u: c -> a all }"));

    [Fact]
    public void Effect_LinesFromOneState_AddUp() => ExploredText.Has(Pair + "event e at 1 when u.a = 2 { u: a -> b; u: a -> c }", "u: a 2 -> u: b 1, c 1 at 1");

    [Fact]
    public void Effect_IfAny_IsSkippedWhereItIsNotPossible() => ExploredText.Has(
        Pair + "counter n 0 .. 1\nevent e at 1 when n = 0 { u: b -> c if any; u: a -> b x 3 if any; n = 1 }", "u: a 2; n = 0 -> u: a 2; n = 1 at 1");

    [Fact]
    public void Effect_DrawnTargets_AreDrawnForEachReplica() => ExploredText.Has(
        Pair + "event e at 16 when u.a = 2 { u: a -> b 0.25, c 0.75 x 2 }",
        "u: a 2 -> u: b 2 at 1",
        "u: a 2 -> u: b 1, c 1 at 6",
        "u: a 2 -> u: c 2 at 9");

    [Fact]
    public void Effect_TargetWithoutChance_IsNotReached() => ExploredText.Has(Pair + "event e at 1 when u.a = 2 { u: a -> b 1, c 0 }", "u: a 2 -> u: a 1, b 1 at 1");

    [Fact]
    public void Effect_TwoDrawnLines_AreDrawnApart() => ExploredText.Has(
        "item u { a -> b at 0; a -> c at 0 }\nitem v { a -> b at 0; a -> c at 0 }\nevent e at 1 when u is a { u: a -> b 0.5, c 0.5; v: a -> b 0.5, c 0.5 }",
        "u: a; v: a -> u: b; v: b at 0.25",
        "u: a; v: a -> u: b; v: c at 0.25",
        "u: a; v: a -> u: c; v: b at 0.25",
        "u: a; v: a -> u: c; v: c at 0.25");

    [Fact]
    public void Effect_ChancesThatReadTheState_FollowIt() => ExploredText.Has(
        "counter n 0 .. 1 start 1\nitem u { a -> b at 0; a -> c at 0 }\nevent e at 8 when u is a { u: a -> b n / 4, c 1 - n / 4 }",
        "u: a; n = 1 -> u: b; n = 1 at 2",
        "u: a; n = 1 -> u: c; n = 1 at 6");

    [Fact]
    public void Effect_NearlyWholeValues_AreRounded() => ExploredText.Has("counter n 0 .. 3\nevent e at 1 when n = 0 { n = 3 * (1 + 1e-11) }", "n = 0 -> n = 3 at 1");

    [Fact]
    public void Event_ZeroRate_NeverHappensAndItsEffectsAreNotLookedAt() => Assert.Empty(ExploredText.Transitions("counter n 0 .. 3\nevent e at 0 { n = 100 }"));

    [Fact]
    public void Occurrences_OfSelfLoops_AreEarned()
    {
        var model = Model.Parse(
            """
            item u { a -> a at 3 named spin }
            counter n 0 .. 1
            event tick at 5 { }
            reward r { each u.spin 2; each tick }
            measure m = total r over 10
            """);
        Assert.Equal((2 * 3 * 10) + (5 * 10), model.Solve("m").Value, 1e-12);
    }
}
