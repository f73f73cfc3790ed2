using ChainSolve.Binding;
using ChainSolve.Language.Syntax;
using ChainSolve.Modelling;

namespace ChainSolve.Tests.Binding;

public sealed class DimensionTests
{
    private const string Store = "item compressor x 2 { run -> broken at 1/60 d ; broken -> run at 1/8 h }\n";

    [Theory]
    [InlineData("9 h", 9)]
    [InlineData("1/20 h", 1.0 / 20)]
    [InlineData("1/700 per h", 1.0 / 700)]
    [InlineData("2 per 1000 h * 3", 0.006)]
    [InlineData("3 h", 3)]
    [InlineData("(1 + 2) d", 72)]
    [InlineData("500 FIT", 5e-7)]
    [InlineData("97 %", 0.97)]
    [InlineData("1 wk", 168)]
    [InlineData("1 mo", 730)]
    [InlineData("1 y", 8760)]
    [InlineData("30 min", 0.5)]
    [InlineData("36 s", 0.01)]
    [InlineData("3600000 ms", 1)]
    [InlineData("35 per h * compressor.run", 70)]
    [InlineData("3 per y", 3.0 / 8760)]
    [InlineData("8 h / 2 h", 4)]
    [InlineData("(3 h)^2", 9)]
    [InlineData("sqrt((3 h)^2 * (2 h)^2)", 6)]
    [InlineData("min(3 h, 0, 1 d)", 0)]
    [InlineData("0 + 3 h", 3)]
    public void Bind_Units_GiveHours(string expression, double value) =>
        Assert.Equal(value, Bound.Probe(Store + "let probe = " + expression, ("compressor.run", 2)), 1e-15);

    [Theory]
    [InlineData("12 h", 0.5)]
    [InlineData("2 per h", 48)]
    [InlineData("2 per 1000 h", 0.048)]
    [InlineData("500 FIT", 1.2e-5)]
    [InlineData("1 wk", 7)]
    public void Bind_TimebaseOfDays_GivesDays(string expression, double value) =>
        Assert.Equal(value, Bound.Probe("timebase d\n" + Store + "let probe = " + expression), 1e-15);

    [Theory]
    [InlineData("9 h + 3", "B230 these cannot be added or subtracted: '9 h' is a time and '3' is a plain number; write its unit, such as 3 h")]
    [InlineData("3 + 9 per h", "B230 these cannot be added or subtracted: '3' is a plain number and '9 per h' is a rate (1/time); write its unit, such as 3 per h")]
    [InlineData("9 h - 3 per h", "B230 these cannot be added or subtracted: '9 h' is a time and '3 per h' is a rate (1/time)")]
    [InlineData("count(9 h > 3)", "B230 these cannot be compared: '9 h' is a time and '3' is a plain number; write its unit, such as 3 h")]
    [InlineData("max(9 h, 2 * 3)", "B230 the arguments of 'max' have one dimension: '9 h' is a time and '2 * 3' is a plain number; a unit such as 'h' is missing")]
    [InlineData("if 1 = 1 then 9 h else (2 h)^2", "B230 both branches of an 'if' have one dimension: '9 h' is a time and '(2 h)^2' is a time^2")]
    [InlineData("3 h + compressor.run", "B230 these cannot be added or subtracted: '3 h' is a time and 'compressor.run' is a plain number")]
    [InlineData("exp(3 h)", "B231 'exp' needs a plain number; '3 h' is a time")]
    [InlineData("2^(3 h)", "B231 the exponent needs a plain number; '(3 h)' is a time")]
    [InlineData("(3 h)^0.5", "B235 '(3 h)' is a time; its power needs a written whole number, or divide by a unit first")]
    [InlineData("sqrt(3 h)", "B235 '3 h' is a time, whose square root is no power of time; take the root of a product instead, such as sqrt(a * b)")]
    [InlineData("(3 h) d", "B233 '(3 h)' is a time already; leave out 'd'")]
    public void Bind_UnlikeDimensions_NamesBoth(string expression, string message)
    {
        var fault = Assert.Single(Bound.Faults(Store + "let x = " + expression));

        Assert.Equal(message, fault[(fault.IndexOf(' ', StringComparison.Ordinal) + 1)..]);
    }

    [Fact]
    public void Bind_RateWhereATimeIsNeeded_TurnsIt() =>
        Assert.Equal(
            ["3:41 B231 a time of a measure needs a time; 'lambda' is a rate (1/time); write 1/lambda"],
            Bound.Faults(Store + "given lambda = 2 per y\nmeasure m = average compressor.run over lambda"));

    [Fact]
    public void Bind_TimeWhereARateIsNeeded_TurnsIt() =>
        Assert.Equal(
            ["2:25 B231 the rate of on -> off needs a rate (1/time); 'fix' is a time; write 1/fix"],
            Bound.Faults("given fix = 9 h\nitem fan { on -> off at fix ; off -> on at 1/fix }"));

    [Fact]
    public void Bind_PlainWhereARateIsNeeded_SuggestsTheUnit() =>
        Assert.Equal(
            ["1:25 B231 the rate of on -> off needs a rate (1/time); '3' is a plain number; write its unit, such as 3 per h"],
            Bound.Faults("item fan { on -> off at 3 ; off -> on at 1/9 h }"));

    [Fact]
    public void Bind_LiteralZero_FitsAll()
    {
        var model = Bound.Model("item fan { on -> off at 0 ; off -> on at if fan is off then 1/9 h else 0 }\nmeasure m = average fan.on over 0, 3 h");

        Assert.Equal(0, Bound.Rate(model, "move on -> off of fan", ("fan.on", 1)));
    }

    [Fact]
    public void Bind_GivenZero_IsPlain() =>
        Assert.Equal(
            ["2:25 B231 the rate of on -> off needs a rate (1/time); 'none' is a plain number; a unit such as 'per h' is missing"],
            Bound.Faults("given none = 0\nitem fan { on -> off at none ; off -> on at 1/9 h }"));

    [Fact]
    public void Bind_NoUnitAtAll_IsNotChecked()
    {
        var model = Bound.Model("given fix = 9\nitem fan { on -> off at 2 + fix ; off -> on at 1/fix }\nmeasure m = average fan.on over 5 %, 3\nmeasure t = mean time to fan is off");

        Assert.True(model.TimeBase.IsUnitless);
        Assert.Equal("", model.Measures[1].Unit);
        Assert.Equal(11, Bound.Rate(model, "move on -> off of fan", ("fan.on", 1)));
    }

    [Fact]
    public void Bind_NoTimebase_IsHours() => Assert.Equal("h", Bound.Model(Store).TimeBase.Unit);

    [Fact]
    public void Bind_OneUnitAgainstManyBareNumbers_IsOneFault() =>
        Assert.Equal(
            ["1:27 B232 this one unit stands against 4 numbers without the unit that their place needs; give every time and rate its unit, or leave out all units"],
            Bound.Faults("item a { on -> off at 1/9 h ; off -> on at 2 }\nitem b { on -> off at 2 ; off -> on at 2 }\nmeasure m = average a.on over 5"));

    [Fact]
    public void Bind_SomeBareNumbersAmongUnits_AreFaultsOneByOne() =>
        Assert.Equal(
            [
                "2:23 B231 the rate of off -> on needs a rate (1/time); '0 + 2' is a plain number; a unit such as 'per h' is missing",
                "3:23 B231 the rate of on -> off needs a rate (1/time); '5' is a plain number; write its unit, such as 5 per h",
            ],
            Bound.Faults("item a { on -> off at 1/9 h\n         off -> on at 0 + 2 }\nitem b { on -> off at 5 ; off -> on at 2 per h }"));

    [Fact]
    public void Bind_TimebaseOfAnUnknownWord_ListsTheUnits() =>
        Assert.Equal(
            ["2:10 B234 'hours' is not a unit of time; known are ms s min h d wk mo y"],
            Bound.Faults(Store + "timebase hours"));

    [Fact]
    public void Bind_TimebaseWithoutUnits_IsAFault() =>
        Assert.Equal(
            ["2:10 B234 no number of this file has a unit, so results have none either; give the times and rates their units or leave out 'timebase d'"],
            Bound.Faults("item fan { on -> off at 2 ; off -> on at 3 }\ntimebase d"));

    [Fact]
    public void Bind_EveryUnitOfTheNotation_HasItsScale() =>
        Assert.All(UnitWords.All, unit => Assert.NotNull(UnitScale.Of(unit, TimeBase.Hour)));

    [Fact]
    public void Bind_PerFailures_IsAFault() =>
        Assert.Equal(
            ["2:15 B233 behind 'per' stands a unit of time (ms s min h d wk mo y), not 'FIT'"],
            Bound.Faults(Store + "let x = 3 per FIT"));
}
