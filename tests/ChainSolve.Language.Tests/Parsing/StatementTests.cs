using ChainSolve.Language.Printing;
using ChainSolve.Language.Syntax;
using ChainSolve.Language.Tests.Support;

namespace ChainSolve.Language.Tests.Parsing;

/// <summary>Every form of every statement, in the layout of the printer: read without a fault, and printed as it was.</summary>
public class StatementTests
{
    [Theory]
    [InlineData("model \"Lift station\"")]
    [InlineData("timebase d")]
    [InlineData("given n = 3")]
    [InlineData("given l = 180e-6 per h in 1e-6 per h .. 1e-3 per h")]
    [InlineData("given l = 2 per 1000 h spread uniform(1 per 1000 h, 3 per 1000 h)")]
    [InlineData("given l = 2 per 1000 h in 0 per h .. 1 per h spread lognormal(2 per 1000 h, 3)")]
    [InlineData("given l = 0.5 spread gamma(2, 0.25)")]
    [InlineData("given l = 0.5 spread beta(2, 3)")]
    [InlineData("given l = 0.5 spread triangular(0, 0.5, 1)")]
    [InlineData("let flowing = pump.up >= 2")]
    [InlineData("let f(a, b) = a * b")]
    [InlineData("let a = if b then 1 else 2")]
    [InlineData("crew fitter = 2")]
    [InlineData("crew fitter = fitters + 1 ranked")]
    [InlineData("counter shelf 0 .. 3")]
    [InlineData("counter shelf -2 .. n start n - 1")]
    [InlineData("event order at 1 per wk when shelf < 3 {\n    shelf = shelf + 1\n}")]
    [InlineData("event strike at 1 per y {\n    pump: up -> down x 2\n}")]
    [InlineData("event strike at 1 per y {\n    pump: up -> down all\n    fan: up -> down if any\n    shelf = 0\n}")]
    [InlineData("event strike at 1 per y {\n    pump: up -> down 0.25, stuck 0.75 x (n - 1) if any\n}")]
    [InlineData("event nothing at 1 per mo {\n}")]
    [InlineData("item pump {\n    up -> down at 1\n}")]
    [InlineData("item pump x n {\n    states up, down\n    start up 2, down 1\n    up -> down at 1\n}")]
    [InlineData("item pump x (n + 1) (l = 2, m = l * 2), fan, van x 0 {\n    start up\n    up -> down at l\n}")]
    [InlineData("item pump {\n    start up 0.25, down 0.75\n    up -> down at 1 per h when a by fitter rank 2 named fail {\n        shelf = shelf - 1\n    }\n}")]
    [InlineData("item pump {\n    up -> down 0.9, stuck 0.1 at 1 per h named fail\n    down -> up after mean 9 h by fitter\n    up -> up at 3 named spin\n}")]
    [InlineData("reward stopped = 1 while not flowing")]
    [InlineData("reward r in \"kWh\" = 3 * pump.up")]
    [InlineData("reward r in \"EUR\" {\n    rate 420 per h while not flowing\n    rate 35 per h * pump.down\n    each pump.fail 150\n    each order\n    each pump.fail n while a\n}")]
    [InlineData("reward r {\n}")]
    [InlineData("measure m = probability flowing at 1 h, 10 h, 1 y")]
    [InlineData("measure m = probability flowing steady")]
    [InlineData("measure m = probability flowing at 0 h .. 8760 h step 73 h, 2 y, 1 h .. 10 y log 25")]
    [InlineData("measure m = expected cost at 1 h")]
    [InlineData("measure m = expected pump.up steady")]
    [InlineData("measure m = expected (a + b while c) at 1")]
    [InlineData("measure m = average flowing over 1 y")]
    [InlineData("measure m = average (shelf) steady")]
    [InlineData("measure m = total cost over 1 y")]
    [InlineData("measure m = total (1 while a) until b")]
    [InlineData("measure m = reliability flowing over 1 y")]
    [InlineData("measure m = onset not flowing over 1 y")]
    [InlineData("measure m = entries not flowing at 1 h")]
    [InlineData("measure m = entries not flowing over 1 y")]
    [InlineData("measure m = entries not flowing steady")]
    [InlineData("measure m = mean time to not flowing")]
    [InlineData("measure m = deviation time to not flowing")]
    [InlineData("measure m = quantile 5 % time to not flowing")]
    [InlineData("measure m = quantile q time to pump is down or a")]
    [InlineData("measure m = mean spell not flowing steady")]
    public void Print_StatementThatWasRead_IsTheStatement(string text)
    {
        var model = Read.Model(text);
        Assert.Single(model.Statements);
        Assert.Equal(text + "\n", ModelPrinter.Print(model));
    }

    [Theory]
    [InlineData("item a { u->v at 1;v->u at 2 }", "item a {\n    u -> v at 1\n    v -> u at 2\n}\n")]
    [InlineData("let   a=1+2 *3", "let a = 1 + 2 * 3\n")]
    [InlineData("let a = 9h", "let a = 9 h\n")]
    [InlineData("let a = not(b)and c.up>=2", "let a = not (b) and c.up >= 2\n")]
    [InlineData("counter n 0..3", "counter n 0 .. 3\n")]
    [InlineData("given a = 1 in 1..2 h", "given a = 1 in 1 h .. 2 h\n")]
    [InlineData("event e at 1 { }", "event e at 1 {\n}\n")]
    [InlineData("item a {\n;;u -> v at 1;\n}", "item a {\n    u -> v at 1\n}\n")]
    public void Print_OtherLayouts_AreBroughtIntoOne(string text, string printed) => Assert.Equal(printed, ModelPrinter.Print(Read.Model(text)));

    [Fact]
    public void Read_Item_HasItsHeads()
    {
        var item = Read.Statement<ItemSyntax>("item p x n (l = 2, m = 3), q { u -> v at l }");
        Assert.Equal(["p", "q"], item.Heads.Select(h => h.Name.Text));
        Assert.Equal(["l", "m"], item.Heads[0].Locals.Select(l => l.Name.Text));
        Assert.Equal(("n", "-"), (Shape.Of(item.Heads[0].Count), Shape.Of(item.Heads[1].Count)));
        Assert.Empty(item.Heads[1].Locals);
    }

    [Fact]
    public void Read_Move_HasItsParts()
    {
        var move = Read.Clause<MoveSyntax>("a -> b 0.9, c 0.1 at 2 per h when d by crew1 rank 3 named fail { n = 1 }");
        Assert.Equal(("a", "crew1", "fail"), (move.From.Text, move.Crew!.Text, move.Name!.Text));
        Assert.Equal(["b 0.9", "c 0.1"], move.Targets.Select(t => $"{t.State.Text} {Shape.Of(t.Share)}"));
        Assert.Equal(("[2 Per h]", "d", "3"), (Shape.Of(move.Rate), Shape.Of(move.When), Shape.Of(move.Rank)));
        Assert.Null(move.Delay);
        Assert.Single(move.Effects);
    }

    [Fact]
    public void Read_MoveAfterAMean_HasADelay() => Assert.Equal("[9 h]", Shape.Of(Read.Clause<MoveSyntax>("a -> b after mean 9 h").Delay!.Mean));

    [Theory]
    [InlineData("p: a -> b", false, false, "-")]
    [InlineData("p: a -> b all", true, false, "-")]
    [InlineData("p: a -> b x 2", false, false, "2")]
    [InlineData("p: a -> b x n if any", false, true, "n")]
    [InlineData("p: a -> b x (n + 1) if any", false, true, "([n Add 1])")]
    [InlineData("p: a -> all if any", false, true, "-")]
    [InlineData("p: a -> x", false, false, "-")]
    public void Read_ItemMove_SaysHowMany(string effect, bool all, bool ifAny, string count)
    {
        var move = Assert.IsType<ItemMoveSyntax>(Assert.Single(Read.Statement<EventSyntax>($"event e at 1 {{ {effect} }}").Effects));
        Assert.Equal((all, ifAny, count), (move.MovesAll, move.IfAny, Shape.Of(move.Count)));
    }

    [Theory]
    [InlineData("probability a at 1", MeasureKind.Probability, MeasureScope.At)]
    [InlineData("expected a steady", MeasureKind.Expected, MeasureScope.Steady)]
    [InlineData("average a over 1", MeasureKind.Average, MeasureScope.Over)]
    [InlineData("average a steady", MeasureKind.Average, MeasureScope.Steady)]
    [InlineData("total a until b", MeasureKind.Total, MeasureScope.Until)]
    [InlineData("reliability a over 1", MeasureKind.Reliability, MeasureScope.Over)]
    [InlineData("onset a over 1", MeasureKind.Onset, MeasureScope.Over)]
    [InlineData("entries a at 1", MeasureKind.Entries, MeasureScope.At)]
    [InlineData("mean time to a", MeasureKind.MeanTime, MeasureScope.None)]
    [InlineData("deviation time to a", MeasureKind.DeviationTime, MeasureScope.None)]
    [InlineData("quantile 0.5 time to a", MeasureKind.QuantileTime, MeasureScope.None)]
    [InlineData("mean spell a steady", MeasureKind.MeanSpell, MeasureScope.Steady)]
    public void Read_Measure_HasItsForm(string form, MeasureKind kind, MeasureScope scope)
    {
        var measure = Read.Statement<MeasureSyntax>($"measure m = {form}");
        Assert.Equal((kind, scope), (measure.Kind, measure.Scope));
    }

    [Theory]
    [InlineData("probability a over 1")]
    [InlineData("probability a until b")]
    [InlineData("expected a over 1")]
    [InlineData("total a at 1")]
    [InlineData("total a steady")]
    [InlineData("reliability a at 1")]
    [InlineData("reliability a steady")]
    [InlineData("onset a steady")]
    [InlineData("mean time to a steady")]
    [InlineData("mean spell a over 1")]
    [InlineData("probability a")]
    public void Read_MeasureWithAScopeItDoesNotHave_IsAFault(string form) => Assert.EndsWith("L120", Assert.Single(Read.Faults($"measure m = {form}")));

    [Fact]
    public void Read_Condition_EndsAtTheFirstScopeWordOutsideOfBrackets()
    {
        var measure = Read.Statement<MeasureSyntax>("measure m = probability (a or b) and c.at1 = 1 at 1");
        Assert.Equal("[([a Or b]) And [c.at1 Equal 1]]", Shape.Of(measure.Subject));
    }

    [Theory]
    [InlineData("phase climb for 2 h { l = 3 }")]
    [InlineData("phases repeat")]
    [InlineData("test proof every 1 y { pump: hidden -> up }")]
    [InlineData("group units = u1, u2")]
    [InlineData("common pump.fail beta 0.1")]
    [InlineData("result r = a / b")]
    [InlineData("require a > 0.9")]
    [InlineData("study s { vary a = 1, 2 }")]
    [InlineData("measure m = deviation total a over 1 y")]
    [InlineData("measure m = chance total a > 3 over 1 y")]
    [InlineData("item a { u -> v after erlang(2, mean 3) }")]
    [InlineData("item a { u -> v after stages(1, 2) }")]
    [InlineData("item a { u -> v after mixture(0.5: 1, 0.5: 2) }")]
    [InlineData("item a { u -> v after fixed(3, 5) }")]
    [InlineData("item a { u -> v after match(mean 3, cv 0.5) }")]
    public void Read_PartOfALaterVersion_IsNamedAsSuch(string text) => Assert.EndsWith("L130", Assert.Single(Read.Faults(text)));
}
