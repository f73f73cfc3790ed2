namespace ChainSolve.Tests.StateSpace;

/// <summary>Crews as queues: known birth and death chains, interruption, jobs that are not there.</summary>
public class CrewQueueTests
{
    [Theory]
    [InlineData(1)]
    [InlineData(3)]
    [InlineData(8)]
    public void Crew_ReplicasOfOneItem_IsTheMachineRepairQueue(int hands)
    {
        // Closed form of the finite source queue M/M/c//N (from memory): weights C(N, k) rho^k for k <= c, and k!/(c! c^(k - c)) times that above.
        const int machines = 8;
        const double rho = 0.25;
        var weights = new double[machines + 1];
        weights[0] = 1;
        for (var k = 1; k <= machines; k++)
        {
            weights[k] = weights[k - 1] * (machines - k + 1) * rho / Math.Min(k, hands);
        }

        var model = Model.Parse(FormattableString.Invariant(
            $"crew fitter = {hands}\nitem lathe x {machines} {{ up -> down at 0.5 ; down -> up at 2 by fitter }}\nmeasure waiting = expected (max(0, lathe.down - {hands})) steady\nmeasure idle = probability lathe.down = 0 steady"));
        var sum = weights.Sum();
        Assert.Equal(weights.Select((w, k) => w * Math.Max(0, k - hands)).Sum() / sum, model.Solve("waiting").Value, 1e-13);
        Assert.Equal(1 / sum, model.Solve("idle").Value, 1e-13);
    }

    [Fact]
    public void Crew_RankedAndBusy_LeavesItsWorkForTheMoreUrgent() => ExploredText.Has(
        "crew fitter = 1 ranked\nitem pump { up -> down at 1 ; down -> up at 10 by fitter rank 2 }\nitem fan { on -> off at 2 ; off -> on at 6 by fitter rank 1 }",
        "pump: up; fan: on -> pump: down; fan: on at 1",
        "pump: up; fan: on -> pump: up; fan: off at 2",
        "pump: down; fan: on -> pump: up; fan: on at 10",
        "pump: down; fan: on -> pump: down; fan: off at 2",
        "pump: up; fan: off -> pump: up; fan: on at 6",
        "pump: up; fan: off -> pump: down; fan: off at 1",
        "pump: down; fan: off -> pump: down; fan: on at 6");

    [Fact]
    public void Crew_OfNobody_LeavesTheWork() => ExploredText.Has(
        "crew fitter = 0\nitem pump { up -> down at 1 ; down -> up at 10 by fitter ; down -> up at 0.5 }",
        "pump: up -> pump: down at 1",
        "pump: down -> pump: up at 0.5");

    [Fact]
    public void Crew_RatesThatReadTheirOwnEmptyState_AreNotAsked() => ExploredText.Has(
        "crew fitter = 1 ranked\nitem pump { up -> down at 1 ; down -> up at 10/pump.down by fitter rank 2 }\nitem fan { start off\noff -> on at 6/fan.off by fitter rank 1 }",
        "pump: up; fan: off -> pump: down; fan: off at 1",
        "pump: up; fan: off -> pump: up; fan: on at 6",
        "pump: down; fan: off -> pump: down; fan: on at 6",
        "pump: up; fan: on -> pump: down; fan: on at 1",
        "pump: down; fan: on -> pump: up; fan: on at 10");

    [Fact]
    public void Crew_DelayWithAMean_IsSlowedByTheShare() => ExploredText.Has(
        "crew fitter = 1\nitem pump x 2 { start down 2\ndown -> up after mean 4 by fitter }",
        "pump: down 2 -> pump: down 1, up 1 at 0.25",
        "pump: down 1, up 1 -> pump: up 2 at 0.25");

    [Fact]
    public void Crew_SeveralRanksOutOfOneState_CountAtTheMostUrgentThatIsEnabled() => ExploredText.Has(
        "crew fitter = 1 ranked\ncounter parts 0 .. 1 start 1\nitem pump { start down\ndown -> up at 10 when parts > 0 by fitter rank 1 ; down -> clean at 4 by fitter rank 3 }\n"
        + "item fan { start off\noff -> on at 6 by fitter rank 2 { parts = 0 } }",
        "pump: down; fan: off; parts = 1 -> pump: up; fan: off; parts = 1 at 10",
        "pump: down; fan: off; parts = 1 -> pump: clean; fan: off; parts = 1 at 4",
        "pump: up; fan: off; parts = 1 -> pump: up; fan: on; parts = 0 at 6",
        "pump: clean; fan: off; parts = 1 -> pump: clean; fan: on; parts = 0 at 6");

    [Fact]
    public void Crew_SizeSetAnew_SharesByIt() => Assert.Equal(
        [8, 6, 4, 2],
        new[] { 4, 3, 2, 1 }.Select(c =>
        {
            var model = Model.Parse("given hands = 4\ncrew fitter = hands\nitem pump x 4 { start down 4\ndown -> up at 2 by fitter }\nmeasure m = expected (pump.up) at 1").With("hands", c);
            return model.Explore().LargestExitRate;
        }));
}
