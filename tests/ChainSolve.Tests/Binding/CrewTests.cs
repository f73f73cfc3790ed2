namespace ChainSolve.Tests.Binding;

public sealed class CrewTests
{
    private const string Repair = "move broken -> run of compressor";

    private static double Share(string text, string label, double alone, params (string Name, int Value)[] marking) =>
        Bound.Rate(Bound.Model(text), label, marking) / alone;

    [Theory]
    [InlineData(1, 1)]
    [InlineData(2, 2)]
    [InlineData(3, 3)]
    [InlineData(4, 3)]
    [InlineData(5, 3)]
    public void Bind_SharedCrew_ServesEachJobAlike(int jobs, double served)
    {
        const string text = "given members = 3\ncrew mechanic = members\nitem compressor x 5 { run -> broken at 1/9 h ; broken -> run at 1 per h by mechanic }";

        Assert.Equal(served, Bound.Rate(Bound.Model(text), Repair, ("compressor.broken", jobs)), 1e-15);
    }

    [Fact]
    public void Bind_CrewOfNobody_ServesNothing() =>
        Assert.Equal(0, Bound.Rate(Bound.Model("given members = 0\ncrew mechanic = members\nitem compressor x 2 { run -> broken at 1/9 h ; broken -> run at 1 per h by mechanic }"), Repair, ("compressor.broken", 2)));

    [Fact]
    public void Bind_CrewOverTwoItems_CountsJobsOfBoth()
    {
        const string text = "crew mechanic = 1\nitem compressor x 4 { run -> broken at 1/9 h ; broken -> run at 1 per h by mechanic }\nitem fan x 2 { on -> off at 1/9 h ; off -> on at 6 per h by mechanic }";
        (string, int)[] marking = [("compressor.broken", 2), ("fan.off", 1)];

        Assert.Equal(2.0 / 3, Bound.Rate(Bound.Model(text), Repair, marking), 1e-15);
        Assert.Equal(6.0 / 3, Bound.Rate(Bound.Model(text), "move off -> on of fan", marking), 1e-15);
    }

    [Fact]
    public void Bind_TwoMovesOutOfOneState_AreOneJob()
    {
        const string text = "crew mechanic = 1\nitem compressor x 4 { run -> broken at 1/9 h ; broken -> run at 1 per h by mechanic ; broken -> scrapped at 2 per h by mechanic }";
        (string, int)[] marking = [("compressor.broken", 2)];

        Assert.Equal(0.5 * 2 * 1, Bound.Rate(Bound.Model(text), Repair, marking), 1e-15);
        Assert.Equal(0.5 * 2 * 2, Bound.Rate(Bound.Model(text), "move broken -> scrapped of compressor", marking), 1e-15);
    }

    [Fact]
    public void Bind_MoveThatWaits_IsNoJob()
    {
        const string text = "crew mechanic = 1\ncounter seals 0 .. 3\nitem compressor x 4 { run -> broken at 1/9 h ; broken -> run at 1 per h when seals > 0 by mechanic }\nitem fan { on -> off at 1/9 h ; off -> on at 1 per h by mechanic }";

        Assert.Equal(1, Bound.Rate(Bound.Model(text), "move off -> on of fan", ("compressor.broken", 3), ("fan.off", 1)));
        Assert.Equal(0.25, Bound.Rate(Bound.Model(text), "move off -> on of fan", ("compressor.broken", 3), ("fan.off", 1), ("seals", 1)));
        Assert.Equal(0, Bound.Rate(Bound.Model(text), Repair, ("compressor.broken", 3), ("fan.off", 1)));
    }

    [Fact]
    public void Bind_MoveOfRateZero_IsNoJob()
    {
        const string text = "crew mechanic = 1\ncounter on_site 0 .. 1\nitem compressor x 4 { run -> broken at 1/9 h ; broken -> run at on_site per h by mechanic }\nitem fan { on -> off at 1/9 h ; off -> on at 1 per h by mechanic }";

        Assert.Equal(1, Bound.Rate(Bound.Model(text), "move off -> on of fan", ("compressor.broken", 3), ("fan.off", 1)));
        Assert.Equal(0.25, Bound.Rate(Bound.Model(text), "move off -> on of fan", ("compressor.broken", 3), ("fan.off", 1), ("on_site", 1)));
    }

    [Fact]
    public void Bind_RankedCrew_ServesTheLowestNumberFirst()
    {
        const string text = "crew rigger = 2 ranked\nitem pump x 3 { up -> down at 1/9 h ; down -> up at 1 per h by rigger rank 1 }\nitem screen x 2 { clear -> clogged at 1/9 h ; clogged -> clear at 1 per h by rigger rank 2 }";
        const string rake = "move clogged -> clear of screen";

        Assert.Equal(1, Share(text, rake, 2, ("screen.clogged", 2)));
        Assert.Equal(0.5, Share(text, rake, 2, ("screen.clogged", 2), ("pump.down", 1)));
        Assert.Equal(0, Share(text, rake, 2, ("screen.clogged", 2), ("pump.down", 2)));
        Assert.Equal(0, Share(text, rake, 2, ("screen.clogged", 2), ("pump.down", 3)));
        Assert.Equal(2, Bound.Rate(Bound.Model(text), "move down -> up of pump", ("screen.clogged", 2), ("pump.down", 3)), 1e-15);
    }

    [Fact]
    public void Bind_EqualRanks_Share()
    {
        const string text = "crew rigger = 1 ranked\nitem pump x 3 { up -> down at 1/9 h ; down -> up at 1 per h by rigger rank 5 }\nitem screen x 2 { clear -> clogged at 1/9 h ; clogged -> clear at 1 per h by rigger rank 5 }";

        Assert.Equal(0.25, Share(text, "move clogged -> clear of screen", 1, ("screen.clogged", 1), ("pump.down", 3)));
    }

    [Fact]
    public void Bind_JobWithMovesOfTwoRanks_CountsAtItsMostUrgentEnabledOne()
    {
        // The pump's repair is urgent while parts are there; without parts only its cleaning, of the last rank, is left.
        const string text = "crew rigger = 1 ranked\ncounter parts 0 .. 1\nitem pump { up -> down at 1/9 h ; down -> up at 1 per h when parts > 0 by rigger rank 1 ; down -> clean at 1 per h by rigger rank 3 }\nitem screen { clear -> clogged at 1/9 h ; clogged -> clear at 1 per h by rigger rank 2 }";
        (string, int)[] without = [("pump.down", 1), ("screen.clogged", 1)];
        (string, int)[] with = [.. without, ("parts", 1)];
        var model = Bound.Model(text);

        Assert.Equal(1, Bound.Rate(model, "move down -> up of pump", with));
        Assert.Equal(1, Bound.Rate(model, "move down -> clean of pump", with));
        Assert.Equal(0, Bound.Rate(model, "move clogged -> clear of screen", with));
        Assert.Equal(0, Bound.Rate(model, "move down -> up of pump", without));
        Assert.Equal(0, Bound.Rate(model, "move down -> clean of pump", without));
        Assert.Equal(1, Bound.Rate(model, "move clogged -> clear of screen", without));
    }

    [Fact]
    public void Bind_RankWithoutARankedCrew_IsAFault() =>
        Assert.Equal(
            ["2:72 B244 crew 'rigger' has no ranks; declare it with 'ranked' or leave out the rank"],
            Bound.Faults("crew rigger = 1\nitem pump { up -> down at 1/9 h ; down -> up at 1 per h by rigger rank 1 }"));

    [Fact]
    public void Bind_RankedCrewWithoutARank_IsAFault() =>
        Assert.Equal(
            ["2:60 B244 crew 'rigger' is ranked; write the rank behind it: by rigger rank 1"],
            Bound.Faults("crew rigger = 1 ranked\nitem pump { up -> down at 1/9 h ; down -> up at 1 per h by rigger }"));

    [Fact]
    public void Bind_RankFromAGiven_IsAFault() =>
        Assert.Equal(
            ["3:72 B244 a rank is a fixed number; 'k' is not"],
            Bound.Faults("given k = 1\ncrew rigger = 1 ranked\nitem pump { up -> down at 1/9 h ; down -> up at 1 per h by rigger rank k }"));

    [Fact]
    public void Bind_UnknownCrew_NamesTheNearest() =>
        Assert.Equal(
            ["2:60 B204 unknown crew 'riger'; nearest: 'rigger'"],
            Bound.Faults("crew rigger = 1\nitem pump { up -> down at 1/9 h ; down -> up at 1 per h by riger }"));

    [Fact]
    public void Bind_SomethingElseAsCrew_IsAFault() =>
        Assert.Equal(
            ["2:60 B205 'n' is a given; a move is served 'by' a crew"],
            Bound.Faults("given n = 1\nitem pump { up -> down at 1/9 h ; down -> up at 1 per h by n }"));

    [Fact]
    public void Bind_CrewThatIsNotWhole_IsAFault() =>
        Assert.Equal(
            ["2:6 B284 crew 'rigger' comes out with 1.5 members; that has to be a whole number from 0"],
            Bound.Faults("given n = 3\ncrew rigger = n / 2\nitem pump { up -> down at 1/9 h ; down -> up at 1 per h by rigger }"));

    [Fact]
    public void Bind_MoreJobsThanMembers_WarnsOfMemorylessRepairs() =>
        Assert.Equal(
            ["1:6 B302 up to 3 jobs can be open for 2 of crew 'rigger', and the jobs are memoryless: the time of those under way can be overstated (IEC 61165)"],
            Bound.Warnings("crew rigger = 2\nitem pump x 3 { up -> down at 1/9 h ; down -> up at 1 per h by rigger }"));

    [Fact]
    public void Bind_NoMoreJobsThanMembers_DoesNotWarn() =>
        Assert.Empty(Bound.Warnings("crew rigger = 3\nitem pump x 3 { up -> down at 1/9 h ; down -> up at 1 per h by rigger }"));
}
