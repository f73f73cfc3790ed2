using ChainSolve.Binding;

namespace ChainSolve.Tests.Binding;

public sealed class GivenResolverTests
{
    private const string Store = """
        timebase d
        given fix   = 9 h in 4 .. 24 h
        given cut   = 2 per 1000 h
        given slow  = 1/20 h
        given p     = 5 %
        given n     = 3 in 1 .. 4
        given twice = 2 * fix in 1 .. 30 h
        crew fitter = n
        item fan x n { on -> off at cut * p + slow ; off -> on at 1/twice by fitter }
        """;

    private static GivenResolution Set(params (string Name, string Text)[] settings) =>
        new GivenResolver(Bound.Model(Store)).Resolve([.. settings.Select(s => GivenSetting.Of(s.Name, s.Text))]);

    private static string[] Faults(params (string Name, string Text)[] settings)
    {
        var resolution = Set(settings);
        Assert.Null(resolution.Values);
        return [.. resolution.Faults.Select(f => $"{f.Source.Name} {Bound.Show(f)}")];
    }

    [Fact]
    public void Resolve_Nothing_GivesTheModelsOwnValues() =>
        Assert.Equal([0.375, 0.048, 1.2, 0.05, 3, 0.75], Set().Values!.AsSpan().ToArray().Select(v => Math.Round(v, 15)));

    [Theory]
    [InlineData("fix", "12", 0, 0.5, "fix = 12 h")]
    [InlineData("cut", "3", 1, 0.072, "cut = 3 per 1000 h")]
    [InlineData("p", "7", 3, 0.07, "p = 7 %")]
    [InlineData("fix", "2 * 6", 0, 0.5, "fix = 12 h")]
    public void Resolve_BareNumber_IsReadInTheGivensUnitAndEchoed(string name, string text, int index, double value, string echo)
    {
        var resolution = Set((name, text));

        Assert.Equal(value, resolution.Values![index], 1e-15);
        Assert.Equal([echo], resolution.Echoes);
    }

    [Theory]
    [InlineData("fix", "0.5 d", 0, 0.5)]
    [InlineData("fix", "10 h + 120 min", 0, 0.5)]
    [InlineData("slow", "1/12 h", 2, 2)]
    [InlineData("slow", "0", 2, 0)]
    [InlineData("p", "0.5 %", 3, 0.005)]
    [InlineData("n", "4", 4, 4)]
    public void Resolve_ValueWithItsUnit_IsTakenAsItIs(string name, string text, int index, double value)
    {
        var resolution = Set((name, text));

        Assert.Equal(value, resolution.Values![index], 1e-15);
        Assert.Empty(resolution.Echoes);
    }

    [Fact]
    public void Resolve_NumberFromAProgram_IsReadInTheGivensUnit()
    {
        var resolution = new GivenResolver(Bound.Model(Store)).Resolve([GivenSetting.Of("fix", 12)]);

        Assert.Equal(0.5, resolution.Values![0]);
        Assert.Equal(["fix = 12 h"], resolution.Echoes);
    }

    [Fact]
    public void Resolve_GivenThatUsesOneThatIsSet_Follows()
    {
        Assert.Equal(1, Set(("fix", "12 h")).Values![5]);
        Assert.Equal(0.25, Set(("fix", "12 h"), ("twice", "6 h")).Values![5]);
    }

    [Fact]
    public void Resolve_UnknownGiven_NamesTheNearest() =>
        Assert.Equal(["setting 1:1 B290 unknown given 'fixx'; nearest: 'fix'"], Faults(("fixx", "12")));

    [Fact]
    public void Resolve_GivenOfAModelWithoutAny_SaysSo() =>
        Assert.Equal(
            ["1:1 B290 unknown given 'a'; the model has none"],
            new GivenResolver(Bound.Model("counter c 0 .. 1")).Resolve([GivenSetting.Of("a", 1)]).Faults.Select(Bound.Show));

    [Fact]
    public void Resolve_SetTwice_IsAFault() =>
        Assert.Equal(["setting 1:1 B291 'fix' is set twice; keep one of both"], Faults(("fix", "12"), ("fix", "13")));

    [Fact]
    public void Resolve_OutOfItsRange_IsAFault() =>
        Assert.Equal(["setting of fix 1:1 B282 'fix' is 2 h, outside its range 4 h .. 24 h"], Faults(("fix", "2")));

    [Fact]
    public void Resolve_FollowerOutOfItsRange_IsAFaultInTheModel() =>
        Assert.Equal(["test.chain 7:7 B282 'twice' is 1.66666666667 d, outside its range 0.0416666666667 d .. 1.25 d"], Faults(("fix", "20")));

    [Fact]
    public void Resolve_BareNumberWithoutASingleUnit_IsAFault() =>
        Assert.Equal(
            ["setting of slow 1:1 B292 'slow' is a rate (1/time) and its own expression ends in no single unit, so the value needs one: 3 per d"],
            Faults(("slow", "3")));

    [Fact]
    public void Resolve_WrongDimension_IsAFault() =>
        Assert.Equal(
            ["setting of fix 1:1 B231 'fix' needs a time; '3 per h' is a rate (1/time); write 1/(3 per h)"],
            Faults(("fix", "3 per h")));

    [Fact]
    public void Resolve_NameInAValue_IsAFault() =>
        Assert.Equal(
            ["setting of fix 1:5 B204 'cut' is a name; a value from outside is a number with its unit"],
            Faults(("fix", "2 * cut")));

    [Fact]
    public void Resolve_ConditionAsValue_IsAFault() =>
        Assert.Equal(
            ["setting of fix 1:1 B221 '1 = 1' is a condition; a given needs a number; count(1 = 1) is 1 where it holds and 0 elsewhere"],
            Faults(("fix", "1 = 1")));

    [Fact]
    public void Resolve_TextThatCannotBeRead_GivesTheParsersFault() =>
        Assert.StartsWith("setting of fix 1:", Faults(("fix", "12 +"))[0], StringComparison.Ordinal);

    [Fact]
    public void Resolve_SeveralFaults_TellsAll() => Assert.Equal(2, Faults(("fixx", "12"), ("slow", "3")).Length);

    [Fact]
    public void Resolve_NotFinite_IsAFault() =>
        Assert.Equal(
            ["1:1 B283 'fix' comes out as no number; a given has to be a finite number"],
            new GivenResolver(Bound.Model(Store)).Resolve([GivenSetting.Of("fix", double.NaN)]).Faults.Select(Bound.Show));

    [Fact]
    public void Resolve_CountsThatAreNotWhole_AreFaultsInTheModel() =>
        Assert.Equal(
            [
                "test.chain 9:6 B246 item 'fan' comes out with 2.5 replicas; that has to be a whole number from 0",
                "test.chain 8:6 B284 crew 'fitter' comes out with 2.5 members; that has to be a whole number from 0",
            ],
            Faults(("n", "2.5")));

    [Fact]
    public void Resolve_UnitForAModelWithoutUnits_IsAFault() =>
        Assert.Equal(
            ["1:1 B293 the model has no units, so a value cannot have one either; leave it out"],
            new GivenResolver(Bound.Model("given a = 3\nitem fan { on -> off at a }")).Resolve([GivenSetting.Of("a", "3 h")]).Faults.Select(Bound.Show));

    [Fact]
    public void Resolve_BareNumberBesidePercent_IsAFault() =>
        Assert.Equal(
            ["1:1 B292 'a' is written partly in '%', so a bare number is not clear; write it in '%', such as 3 %"],
            new GivenResolver(Bound.Model("given a = 1 - 5 %\nitem fan { on -> off at a }")).Resolve([GivenSetting.Of("a", "3")]).Faults.Select(Bound.Show));
}
