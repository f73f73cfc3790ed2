using ChainSolve.Binding;
using ChainSolve.Modelling;

namespace ChainSolve.Tests.Binding;

public sealed class GivenTests
{
    private const string Fan = "item fan x 2 { on -> off at 2 per y ; off -> on at 1/9 h }\n";

    [Fact]
    public void Bind_Given_KeepsValueRangeAndSpread()
    {
        var model = Bound.Model(Fan + "given fix = 9 h in 4 .. 24 h spread lognormal(8 h, 3)");

        var given = Assert.Single(model.Givens);
        Assert.Equal(1, given.TimePower);
        Assert.Equal(4, Bound.Value(model, given.Range!.Value.Low));
        Assert.Equal(24, Bound.Value(model, given.Range.Value.High));
        Assert.Equal(SpreadKind.Lognormal, given.Spread!.Kind);
        Assert.Equal([8, 3], given.Spread.Parameters.Select(p => Bound.Value(model, p)));
    }

    [Theory]
    [InlineData("uniform(4 h, 24 h)", "Uniform")]
    [InlineData("gamma(2, 4 h)", "Gamma")]
    [InlineData("triangular(4 h, 9 h, 24 h)", "Triangular")]
    public void Bind_Spread_IsRead(string law, string kind) =>
        Assert.Equal(kind, Bound.Model(Fan + "given fix = 9 h spread " + law).Givens[0].Spread!.Kind.ToString());

    [Fact]
    public void Bind_BetaOfAShare_IsRead() =>
        Assert.Equal(SpreadKind.Beta, Bound.Model(Fan + "given p = 90 % spread beta(9, 1)").Givens[0].Spread!.Kind);

    [Theory]
    [InlineData("uniform(9 h, 4 h)", "1:7 B281 'uniform' needs lo < hi")]
    [InlineData("lognormal(9 h, 1)", "1:7 B281 'lognormal' needs a median above 0 and an error factor above 1")]
    [InlineData("gamma(0, 9 h)", "1:7 B281 'gamma' needs shape and scale above 0")]
    [InlineData("triangular(4 h, 3 h, 9 h)", "1:7 B281 'triangular' needs lo <= mode <= hi and lo < hi")]
    [InlineData("beta(1, 2)", "1:30 B281 'beta' lies between 0 and 1, but this given is a time; take another distribution")]
    [InlineData("uniform(4 h)", "1:30 B209 'uniform' takes 2 arguments (lo, hi), not 1")]
    [InlineData("lognormal(9 h, 3 h)", "1:45 B231 'ef' of 'lognormal' needs a plain number; '3 h' is a time")]
    [InlineData("uniform(4, 24 h)", "1:38 B231 'lo' of 'uniform' needs a time; '4' is a plain number; write its unit, such as 4 h")]
    [InlineData("unifrom(4 h, 2 h)", "1:30 B280 unknown distribution 'unifrom'; there are uniform(lo, hi), lognormal(median, ef), gamma(shape, scale), beta(a, b), triangular(lo, mode, hi); nearest: 'uniform'")]
    public void Bind_SpreadThatCannotBe_IsAFault(string law, string message) =>
        Assert.Equal([message], Bound.Faults("given fix = 9 h       spread " + law + "\n" + Fan));

    [Fact]
    public void Bind_ValueOutsideItsRange_IsAFault() =>
        Assert.Equal(["1:7 B282 'fix' is 9 h, outside its range 10 h .. 24 h"], Bound.Faults("given fix = 9 h in 10 .. 24 h\n" + Fan));

    [Fact]
    public void Bind_RangeBackwards_IsAFault() =>
        Assert.Equal(
            ["1:7 B282 the range begins at 24 h and ends before that, at 4 h; exchange the ends"],
            Bound.Faults("given fix = 9 h in 24 .. 4 h\n" + Fan));

    [Fact]
    public void Bind_RangeOfAnotherDimension_IsAFault() =>
        Assert.Equal(
            ["1:20 B231 the range of this given needs a time; '4' is a plain number; write its unit, such as 4 h"],
            Bound.Faults("given fix = 9 h in 4 .. 8\n" + Fan).Take(1));

    [Fact]
    public void Bind_ValueThatIsNotFinite_IsAFault() =>
        Assert.Equal(["1:7 B283 'x' comes out as no number; a given has to be a finite number"], Bound.Faults("given x = 1/(2 - 2)\n" + Fan));

    [Theory]
    [InlineData("given a = b\ngiven b = 1", "1:11 B211 'b' is declared below; a given may use numbers and the givens above it")]
    [InlineData("given a = a", "1:11 B211 'a' is this given itself; a given may use numbers and the givens above it")]
    [InlineData("let b = 3\ngiven a = b", "2:11 B211 'b' is a let; a given may use numbers and the givens above it")]
    [InlineData("let b(x) = 3\ngiven a = b(1)", "2:11 B211 'b' is a function of this file; a given may use numbers and the givens above it")]
    [InlineData("given a = fan.on", "1:11 B212 'fan.on' depends on the state; a given may use numbers and givens only")]
    public void Bind_GivenThatUsesMore_IsAFault(string text, string message) =>
        Assert.Equal([message], Bound.Faults(text + "\n" + Fan));

    [Fact]
    public void Bind_GivenFromGivensAbove_HasTheirValue()
    {
        var model = Bound.Model("given a = 9 h\ngiven b = 2 * a\n" + Fan);

        Assert.Equal(18, new GivenResolver(model).Defaults().Values![1]);
    }

    [Theory]
    [InlineData("3", "", 1)]
    [InlineData("9 h", "h", 1)]
    [InlineData("2 per 1000 h", "per 1000 h", 0.001)]
    [InlineData("1/700 per h", "per h", 1)]
    [InlineData("5 %", "%", 0.01)]
    [InlineData("500 FIT", "FIT", 1e-9)]
    [InlineData("-(2 d)", "d", 24)]
    [InlineData("2 * 3 d", "d", 24)]
    [InlineData("3 d + 4 d", "d", 24)]
    [InlineData("8 h / 2 h", "", 1)]
    public void Bind_ValueThatEndsInAUnit_IsReadInIt(string value, string unit, double factor)
    {
        var outside = Bound.Model($"given a = {value}\n{Fan}").Givens[0].OutsideUnit;

        Assert.Equal(unit, outside!.Text);
        Assert.Equal(factor, outside.Factor);
    }

    [Theory]
    [InlineData("1/20 h")]
    [InlineData("3 d + 4 h")]
    [InlineData("min(3 h, 4 h)")]
    [InlineData("1 - 5 %")]
    public void Bind_ValueWithoutASingleUnit_HasNone(string value) =>
        Assert.Null(Bound.Model($"given a = {value}\n{Fan}").Givens[0].OutsideUnit);

    [Fact]
    public void Bind_GivensOfCountsAndRanges_ShapeTheStates()
    {
        var model = Bound.Model("given n = 2\ngiven total = n + 1\ngiven top = 4\ngiven s = 1\ngiven fix = 9 h\nitem fan x total { start off s, on total - s ; on -> off at 1/fix ; off -> on at 1/fix }\ncounter stock 0 .. top");

        Assert.Equal(["n", "total", "top", "s"], model.Givens.Where(g => g.ShapesStates).Select(g => g.Name));
    }
}
