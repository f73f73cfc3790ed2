using ChainSolve.Tests.Binding;

namespace ChainSolve.Tests.StateSpace;

/// <summary>Whole messages of faults that only a state shows.</summary>
public class StateFaultTests
{
    [Theory]
    [InlineData("item pump x 2 { up -> down at 1 }\nevent surge at 1e308 * (1 + 9 * pump.down) { }",
        "2:1 S202 the rate of event surge is Infinity; a rate is finite and not negative (in the state 'pump: up 1, down 1', reached by: move up -> down of pump)")]
    [InlineData("item pump x 2 { up -> down at pump.up - 1.5 }",
        "1:17 S202 the rate of move up -> down of pump is -0.5; a rate is finite and not negative (in the state 'pump: up 1, down 1', reached by: move up -> down of pump)")]
    [InlineData("item pump { up -> down at 1 }\nitem fan { on -> off at 1 when sqrt(1 - 2 * pump.down) > 0 }",
        "2:12 S202 the condition of move on -> off of fan has no value; look for a division by zero in it (in the state 'pump: down; fan: on', reached by: move up -> down of pump)")]
    [InlineData("crew c = 1\nitem pump { start down\ndown -> up at 1 by c }\nitem fan { start off\noff -> on at 1/(1 - pump.up) by c }",
        "5:1 S202 the rate of move off -> on of fan has no value; look for a division by zero (in the state 'pump: up; fan: off', reached by: move down -> up of pump)")]
    [InlineData("crew c = 1\nitem pump { start down\ndown -> up at 1 by c }\nitem fan { start off\noff -> on at 1 when 1/fan.on > 0 by c }",
        "5:1 S202 the condition of move off -> on of fan has no value; look for a division by zero in it (in the state 'pump: down; fan: off', where the model starts)")]
    [InlineData("crew c = 1\nitem pump { start down\ndown -> up at 1 by c }\nitem fan { start off\noff -> on at 1/fan.on by c }",
        "5:1 S202 the rate of move off -> on of fan has no value; look for a division by zero (in the state 'pump: down; fan: off', where the model starts)")]
    [InlineData("counter age 0 .. 3\nitem valve { open -> shut 1 - age, stuck age at 1 }\nevent year at 1 when age < 3 { age = age + 2 }",
        "2:14 S203 move open -> shut, stuck of valve would go to valve.shut with the probability -1; a probability is not negative (in the state 'valve: open; age = 2', reached by: event year)")]
    [InlineData("counter age 0 .. 1\nitem valve { open -> shut 0.5, stuck 0.5/(1 - age) at 1 }\nevent year at 1 when age < 1 { age = age + 1 }",
        "2:14 S203 move open -> shut, stuck of valve: the probability of valve.stuck does not exist; look for a division by zero (in the state 'valve: open; age = 1', reached by: event year)")]
    [InlineData("counter n 0 .. 1\nitem pump x 3 { states up, down }\nevent surge at 1 { pump: up -> down x (n - 1) if any }",
        "3:1 S204 event surge would move -1 replicas out of pump.up; the number is whole and not negative (in the state 'pump: up 3; n = 0', where the model starts)")]
    [InlineData("item pump x 3 { states up, down }\nevent surge at 1 { pump: up -> down x 1.5 if any }",
        "2:1 S204 event surge would move 1.5 replicas out of pump.up; the number is whole and not negative (in the state 'pump: up 3', where the model starts)")]
    [InlineData("counter n 0 .. 1\nitem pump x 3 { states up, down }\nevent surge at 1 { pump: up -> down x (1/n) if any }",
        "3:1 S204 event surge: the number of replicas that leave pump.up does not exist; look for a division by zero (in the state 'pump: up 3; n = 0', where the model starts)")]
    [InlineData("item pump { up -> down at 1 ; down -> up at 9 }\nevent surge at 1 { pump: up -> down }",
        "2:1 S205 event surge needs 1 in pump.up, where 0 are left; let it wait with 'when', or skip the line with 'if any' (in the state 'pump: down', reached by: move up -> down of pump)")]
    [InlineData("item pump x 3 { states up, down, lost\nup -> down at 1 { pump: up -> lost x 3 } }",
        "2:1 S205 move up -> down of pump needs 3 in pump.up, where 2 are left; let it wait with 'when', or skip the line with 'if any' (in the state 'pump: up 3', where the model starts)")]
    [InlineData("counter level 0 .. 4 start 3\nevent halve at 1 { level = level/2 }",
        "2:1 S206 event halve would set level to 1.5, which is not a whole number (in the state 'level = 3', where the model starts)")]
    [InlineData("counter level 0 .. 4 start 2\nevent divide at 1 { level = 1/(level - 1) }",
        "2:1 S206 event divide: the new value of level does not exist; look for a division by zero (in the state 'level = 1', reached by: event divide)")]
    [InlineData("counter stock -1 .. 3\nevent arrive at 1 { stock = stock + 1 }",
        "2:1 S207 event arrive would set stock to 4, outside its range -1 .. 3; let it wait with 'when', or widen the range (in the state 'stock = 3', reached by: event arrive (4 times))")]
    [InlineData("counter stock 0 .. 3 start 1\nitem pump { up -> down at 1 { stock = stock - 1 } ; down -> up at 1 }",
        "2:13 S207 move up -> down of pump would set stock to -1, outside its range 0 .. 3; let it wait with 'when', or widen the range (in the state 'pump: up; stock = 0', reached by: move up -> down of pump, move down -> up of pump)")]
    [InlineData("counter stock 0 .. 3 start 1\nevent jump at 1 { stock = 1e30 }",
        "2:1 S207 event jump would set stock to 1E+30, outside its range 0 .. 3; let it wait with 'when', or widen the range (in the state 'stock = 1', where the model starts)")]
    public void Explore_FaultOfAState_SaysWhatWhereAndHowItIsReached(string text, string fault) =>
        Assert.Equal(fault, Fault(text));

    [Fact]
    public void Explore_ManyFaults_TellsTheNearestWithTheSmallestKey()
    {
        // Both states are one step away; the one of the smaller count of the first state has the smaller key.
        const string text = "item pump x 2 { up -> down at 1 ; up -> lost at 1 }\nevent bad at 0 - pump.down - pump.lost { }";
        const string swapped = "event bad at 0 - pump.down - pump.lost { }\nitem pump x 2 { states up, down, lost\nup -> lost at 1 ; up -> down at 1 }";
        const string told = "S202 the rate of event bad is -1; a rate is finite and not negative (in the state 'pump: up 1, lost 1', reached by: move up -> lost of pump)";
        Assert.Equal("2:1 " + told, Fault(text));
        Assert.Equal("1:1 " + told, Fault(swapped));
    }

    [Fact]
    public void Explore_FaultFarAway_ShortensTheWay()
    {
        const string text = "counter a 0 .. 9\ncounter b 0 .. 9\nevent left at 1 when a = b and a < 9 { a = a + 1 }\nevent right at 1 when a > b { b = b + 1 }\nevent end at 1 when b = 9 { a = 10 }";
        Assert.Equal(
            "5:1 S207 event end would set a to 10, outside its range 0 .. 9; let it wait with 'when', or widen the range (in the state 'a = 9; b = 9', reached by: "
            + "event left, event right, event left, event right, event left, event right, event left, …, event right)",
            Fault(text));
    }

    [Fact]
    public void Explore_EffectWhereTheGuardDoesNotHold_IsNotLookedAt() => ExploredText.Has(
        "counter n 0 .. 2\nevent up at 1/(2 - n) when n < 2 { n = n + 1 }", "n = 0 -> n = 1 at 0.5", "n = 1 -> n = 2 at 1");

    [Fact]
    public void Explore_GuardThatGoesNoFurtherThanNeeded_IsNoFault() => ExploredText.Has(
        "counter n 0 .. 1\nevent up at 1 when n < 1 and 1/(1 - n) > 0 { n = n + 1 }", "n = 0 -> n = 1 at 1");

    [Fact]
    public void Explore_TheRatesOutOfAStateOverflowTogether_IsAFaultOfThatState() => Assert.Equal(
        "3:1 S202 with the rate of event down the rates out of a state add to more than 1E+308; choose a shorter unit of time (in the state 'n = 1', reached by: event up)",
        Fault("counter n 0 .. 2\nevent up at 9e307 when n < 2 { n = n + 1 }\nevent down at 9e307 when n > 0 { n = n - 1 }"));

    private static string Fault(string text) =>
        Bound.Show(Assert.Single(Assert.Throws<ModelFaultsException>(() => Model.Parse(text).Explore()).Faults));
}
