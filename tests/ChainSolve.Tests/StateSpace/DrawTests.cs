namespace ChainSolve.Tests.StateSpace;

/// <summary>Targets that are drawn: few and many replicas, lines that are skipped, lines that see what others leave.</summary>
public class DrawTests
{
    [Fact]
    public void Draw_OnAMoveWithIfAny_TakesTheStandbyOrIsSkipped() => ExploredText.Has(
        "item pump { up -> down at 1 { standby: idle -> run 0.75, stuck 0.25 if any } ; down -> up at 10 }\nitem standby { states idle, run, stuck }",
        "pump: up; standby: idle -> pump: down; standby: run at 0.75",
        "pump: up; standby: idle -> pump: down; standby: stuck at 0.25",
        "pump: down; standby: run -> pump: up; standby: run at 10",
        "pump: up; standby: run -> pump: down; standby: run at 1",
        "pump: down; standby: stuck -> pump: up; standby: stuck at 10",
        "pump: up; standby: stuck -> pump: down; standby: stuck at 1");

    [Fact]
    public void Draw_AllAmongThree_IsMultinomial()
    {
        var chain = ExploredText.Explore("item pump x 3 { states up, worn, down }\nevent storm at 1 when pump.up = 3 { pump: up -> up 0.5, worn 0.3, down 0.2 all }");
        var found = new Dictionary<string, double>();
        foreach (var move in chain.Generator.TransitionsFrom(Array.IndexOf(chain.Start, 1)))
        {
            found[chain.Describe(move.To)] = move.Rate;
        }

        Assert.Equal(9, found.Count);
        Assert.Equal(3 * 0.25 * 0.3, found["pump: up 2, worn 1"], 1e-15);
        Assert.Equal(3 * 0.25 * 0.2, found["pump: up 2, down 1"], 1e-15);
        Assert.Equal(3 * 0.5 * 0.09, found["pump: up 1, worn 2"], 1e-15);
        Assert.Equal(6 * 0.5 * 0.3 * 0.2, found["pump: up 1, worn 1, down 1"], 1e-15);
        Assert.Equal(3 * 0.5 * 0.04, found["pump: up 1, down 2"], 1e-15);
        Assert.Equal(0.027, found["pump: worn 3"], 1e-15);
        Assert.Equal(3 * 0.09 * 0.2, found["pump: worn 2, down 1"], 1e-15);
        Assert.Equal(3 * 0.3 * 0.04, found["pump: worn 1, down 2"], 1e-15);
        Assert.Equal(0.008, found["pump: down 3"], 1e-15);
    }

    [Fact]
    public void Draw_BackIntoTheSource_StaysInPart() => ExploredText.Has(
        "item valve x 2 { open -> open 0.5, shut 0.5 at 8 ; shut -> open at 1 }",
        "valve: open 2 -> valve: open 1, shut 1 at 8",
        "valve: open 1, shut 1 -> valve: shut 2 at 4",
        "valve: open 1, shut 1 -> valve: open 2 at 1",
        "valve: shut 2 -> valve: open 1, shut 1 at 2");

    [Fact]
    public void Draw_ChanceZeroInSomeStates_DoesNotHappenThere() => ExploredText.Has(
        "counter age 0 .. 1\nitem valve { open -> shut 1 - age, stuck age at 8 }\nevent year at 1 when age < 1 { age = 1 }",
        "valve: open; age = 0 -> valve: shut; age = 0 at 8",
        "valve: open; age = 0 -> valve: open; age = 1 at 1",
        "valve: open; age = 1 -> valve: stuck; age = 1 at 8",
        "valve: shut; age = 0 -> valve: shut; age = 1 at 1");

    [Fact]
    public void Count_ReadsTheStateBefore() => ExploredText.Has(
        "counter wave 0 .. 2\nitem pump x 3 { states up, down }\nevent storm at 1 when wave < 2 { wave = wave + 1 ; pump: up -> down x wave }",
        "pump: up 3; wave = 0 -> pump: up 3; wave = 1 at 1",
        "pump: up 3; wave = 1 -> pump: up 2, down 1; wave = 2 at 1");

    [Fact]
    public void IfAny_BehindAnotherLine_SeesWhatThatLeaves() => ExploredText.Has(
        "item pump x 2 { states up, down, lost }\nevent storm at 1 when pump.up = 2 { pump: up -> down x 2 ; pump: up -> lost if any }",
        "pump: up 2 -> pump: down 2 at 1");

    [Fact]
    public void All_OnTheMovesOwnSource_LeavesTheOneThatMoves() => ExploredText.Has(
        "item pump x 3 { states up, down, lost\nup -> down at 1 when pump.up = 3 { pump: up -> lost all } }",
        "pump: up 3 -> pump: down 1, lost 2 at 3");

    [Fact]
    public void All_OnAMoveToItsOwnState_LeavesTheOneThatIsBusy() => ExploredText.Has(
        "item pump x 3 { states up, lost\nup -> up at 1 when pump.up = 3 { pump: up -> lost all } }",
        "pump: up 3 -> pump: up 1, lost 2 at 3");

    [Theory]
    [InlineData(3, 0.25)]
    [InlineData(60, 0.375)]
    [InlineData(1500, 0.5)]
    [InlineData(1500, 0.001953125)]
    public void Draw_ManyReplicas_HasTheMomentsOfTheBinomialLaw(int replicas, double chance)
    {
        // The number of those that go has the mean n p and the variance n p (1 - p).
        var chain = ExploredText.Explore(FormattableString.Invariant(
            $"item lamp x {replicas} {{ states on, off }}\nevent surge at 1 when lamp.on = {replicas} {{ lamp: on -> on {1 - chance}, off {chance} all }}"));
        var marking = new int[2];
        var moved = chain.Generator.TransitionsFrom(Array.IndexOf(chain.Start, 1)).Select(t =>
        {
            chain.States.ReadMarking(t.To, marking);
            return (Off: (double)marking[1], t.Rate);
        }).ToList();
        var mean = replicas * chance;
        Assert.Equal(1 - Math.Pow(1 - chance, replicas), moved.Sum(m => m.Rate), 1e-13);
        Assert.Equal(mean, moved.Sum(m => m.Rate * m.Off), 1e-12 * mean);
        Assert.Equal((mean * (1 - chance)) + (mean * mean), moved.Sum(m => m.Rate * m.Off * m.Off), 1e-12 * mean * (mean + 1));
    }
}
