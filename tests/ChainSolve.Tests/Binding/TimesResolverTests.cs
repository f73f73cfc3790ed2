using ChainSolve.Binding;

namespace ChainSolve.Tests.Binding;

public sealed class TimesResolverTests
{
    private const string Fan = "given mission = 3 d\nitem fan { on -> off at 1/mission ; off -> on at 1/9 h }\n";

    private static TimesResolution Resolve(string times, string timebase = "h")
    {
        var model = Bound.Model($"timebase {timebase}\n{Fan}measure m = average fan.on over {times}");
        return TimesResolver.Resolve(model, model.Measures[0].Times, new GivenResolver(model).Defaults().Values!);
    }

    [Theory]
    [InlineData("1 h, 10 h, 1 d", new double[] { 1, 10, 24 })]
    [InlineData("10 h, 1 h", new double[] { 10, 1 })]
    [InlineData("0 h .. 10 h step 5 h", new double[] { 0, 5, 10 })]
    [InlineData("0 h .. 11 h step 5 h", new double[] { 0, 5, 10, 11 })]
    [InlineData("1 h .. 2 h step 5 h", new double[] { 1, 2 })]
    [InlineData("3 h .. 3 h step 5 h", new double[] { 3 })]
    [InlineData("1 h .. 100 h log 3", new double[] { 1, 10, 100 })]
    [InlineData("1 .. 100 h log 2", new double[] { 1, 100 })]
    [InlineData("5 h, 0 .. 1 h step 1 h, mission", new double[] { 5, 0, 1, 72 })]
    [InlineData("0", new double[] { 0 })]
    public void Resolve_Times_AreInTheOrderWritten(string times, double[] expected) => Assert.Equal(expected, Resolve(times).Times);

    [Fact]
    public void Resolve_Timebase_IsTheUnit() => Assert.Equal([0.5, 3], Resolve("12 h, mission", "d").Times!);

    [Theory]
    [InlineData("0 h .. 1 h step 0.1 h", 11)]
    [InlineData("0 h .. 8760 h step 0.1 h", 87_601)]
    [InlineData("0 d .. 1 d step 7 min", 207)]
    [InlineData("0.1 h .. 0.7 h step 0.1 h", 7)]
    [InlineData("1000000 h .. 1000001 h step 0.1 h", 11)]
    public void Resolve_StepThatDividesUpToRounding_HitsTheEndOnce(string times, int count) =>
        Assert.Equal(count, Resolve(times).Times!.Count);

    [Fact]
    public void Resolve_Steps_DoNotAddUpRounding()
    {
        var times = Resolve("0 h .. 8760 h step 0.1 h").Times!;

        Assert.All(Enumerable.Range(0, times.Count - 1), k => Assert.Equal(k * 0.1, times[k]));
        Assert.Equal(8760, times[^1]);
    }

    [Fact]
    public void Resolve_Log_HasAFixedRatioAndExactEnds()
    {
        var times = Resolve("1 h .. 10 y log 25").Times!;

        Assert.Equal((25, 1.0, 87_600.0), (times.Count, times[0], times[^1]));
        Assert.All(Enumerable.Range(1, 24), k => Assert.Equal(Math.Pow(87_600, 1 / 24.0), times[k] / times[k - 1], 1e-12));
    }

    [Theory]
    [InlineData("-(3 h)", "B273 this time is -3 h; times are finite and not negative")]
    [InlineData("1/0 * 1 h", "B273 this time is no number; times are finite and not negative")]
    [InlineData("0/0 * 1 h", "B273 this time is no number; times are finite and not negative")]
    [InlineData("0 h .. 5 h step 0 h", "B274 the step is 0 h; it has to be above 0")]
    [InlineData("0 h .. 5 h step -(1 h)", "B274 the step is -1 h; it has to be above 0")]
    [InlineData("0 h .. 5 h log 3", "B275 with 'log' times begin above 0, not at 0 h")]
    [InlineData("1 h .. 5 h log 1", "B275 behind 'log' stands how many times there are, a whole number from 2, not 1")]
    [InlineData("1 h .. 5 h log 2.5", "B275 behind 'log' stands how many times there are, a whole number from 2, not 2.5")]
    [InlineData("0 h .. 1 y step 1 s", "B276 these are 31536001 times; at most 1000000 are possible, so take a larger step")]
    [InlineData("1 h .. 5 h log 2000000", "B276 these are 2000000 times; at most 1000000 are possible, so take a larger step")]
    [InlineData("5 h .. 1 h step 1 h", "B277 these times begin at 5 h and end before that, at 1 h; exchange the ends")]
    [InlineData("5 h .. 1 h log 3", "B277 these times begin at 5 h and end before that, at 1 h; exchange the ends")]
    public void Resolve_TimesThatCannotBe_AreFaults(string times, string message) =>
        Assert.Equal([$"3:33 {message}"], Bound.Faults($"{Fan}measure m = average fan.on over {times}"));

    [Fact]
    public void Resolve_GivenThatMakesATimeNegative_IsAFault()
    {
        var model = Bound.Model(Fan + "measure m = average fan.on over mission - 1 d");
        var givens = new GivenResolver(model).Resolve([GivenSetting.Of("mission", "12 h")]).Values!;

        Assert.Equal(
            ["3:33 B273 this time is -12 h; times are finite and not negative"],
            TimesResolver.Resolve(model, model.Measures[0].Times, givens).Faults.Select(Bound.Show));
    }
}
