using ChainSolve.Language.Syntax;
using ChainSolve.Modelling;

namespace ChainSolve.Tests.Binding;

public sealed class MeasureTests
{
    private const string Store = "item compressor x 2 { run -> broken at 1 per h named fail ; broken -> run at 4 per h }\ncounter seals 0 .. 6\nlet cold = compressor.run >= 1\nlet power = 3 * compressor.run\nreward cost in \"EUR\" = 5 per h\nreward warm = 1 while not cold\nreward used = 7 per h\n";

    private static BoundMeasure Measure(string text) => Bound.Model($"{Store}measure m = {text}").Measures[0];

    [Theory]
    [InlineData("probability cold at 1 h", "Probability", "At", 0, "")]
    [InlineData("probability not cold and seals > 1 steady", "Probability", "Steady", 0, "")]
    [InlineData("expected cost at 1 h", "Expected", "At", -1, "EUR per h")]
    [InlineData("expected used steady", "Expected", "Steady", -1, "per h")]
    [InlineData("expected seals steady", "Expected", "Steady", 0, "")]
    [InlineData("average cold over 1 y", "Average", "Over", 0, "")]
    [InlineData("average power steady", "Average", "Steady", 0, "")]
    [InlineData("average cost over 1 y", "Average", "Over", -1, "EUR per h")]
    [InlineData("total cost over 1 y", "Total", "Over", 0, "EUR")]
    [InlineData("total warm over 1 y", "Total", "Over", 1, "h")]
    [InlineData("total used over 1 y", "Total", "Over", 0, "")]
    [InlineData("total compressor.run until not cold", "Total", "Until", 1, "h")]
    [InlineData("total (2 h while cold) over 1 y", "Total", "Over", 2, "h^2")]
    [InlineData("expected (1/(2 h)^2) steady", "Expected", "Steady", -2, "per h^2")]
    [InlineData("reliability cold over 1 y", "Reliability", "Over", 0, "")]
    [InlineData("onset not cold over 1 y", "Onset", "Over", 0, "")]
    [InlineData("entries not cold at 1 y", "Entries", "At", -1, "per h")]
    [InlineData("entries not cold over 1 y", "Entries", "Over", 0, "")]
    [InlineData("entries not cold steady", "Entries", "Steady", -1, "per h")]
    [InlineData("mean time to not cold", "MeanTime", "None", 1, "h")]
    [InlineData("deviation time to not cold", "DeviationTime", "None", 1, "h")]
    [InlineData("quantile 5 % time to not cold", "QuantileTime", "None", 1, "h")]
    [InlineData("mean spell not cold steady", "MeanSpell", "Steady", 1, "h")]
    public void Bind_Measure_HasItsFormAndUnit(string text, string kind, string scope, int power, string unit)
    {
        var measure = Measure(text);

        Assert.Equal((kind, scope), (measure.Kind.ToString(), measure.Scope.ToString()));
        Assert.Equal((power, unit), (measure.TimePower, measure.Unit));
        Assert.Equal(text, measure.Sentence);
    }

    [Fact]
    public void Bind_Timebase_SetsTheUnitOfResults()
    {
        var measures = Bound.Model($"timebase d\n{Store}measure m = expected cost steady\nmeasure t = mean time to not cold").Measures;

        Assert.Equal(["EUR per d", "d"], measures.Select(m => m.Unit));
    }

    [Fact]
    public void Bind_Quantile_KeepsTheShare() =>
        Assert.Equal(0.05, Bound.Value(Bound.Model(Store), Measure("quantile 5 % time to not cold").Share!));

    [Fact]
    public void Bind_Until_KeepsTheCondition() => Assert.NotNull(Measure("total cost until not cold").Until);

    [Theory]
    [InlineData("expected seals steady", 4)]
    [InlineData("expected power steady", 6)]
    [InlineData("expected compressor.run steady", 2)]
    [InlineData("expected (seals + 1) steady", 5)]
    [InlineData("expected (seals while seals > 4) steady", 0)]
    [InlineData("expected (seals while seals > 3) steady", 4)]
    [InlineData("expected cost steady", 5)]
    [InlineData("average (seals + 1) steady", 5)]
    public void Bind_Object_HasItsValue(string text, double value)
    {
        var model = Bound.Model($"{Store}measure m = {text}");

        Assert.Equal(value, Bound.Value(model, model.Measures[0].Object!.Rate, ("compressor.run", 2), ("seals", 4)));
        Assert.Null(model.Measures[0].Condition);
    }

    [Fact]
    public void Bind_AverageOfAFunctionCall_IsAnObject() =>
        Assert.NotNull(Bound.Model(Store + "let f(x) = x + 1\nmeasure m = average f(seals) steady").Measures[0].Object);

    [Theory]
    [InlineData("probability seals steady", "8:25 B220 'seals' is a number; 'probability' needs a condition, such as a comparison")]
    [InlineData("expected cold steady", "8:22 B221 'cold' is a condition; 'expected' needs a number; count(cold) is 1 where it holds and 0 elsewhere")]
    [InlineData("mean time to seals", "8:26 B220 'seals' is a number; 'mean time to' needs a condition, such as a comparison")]
    [InlineData("expected 3 * seals steady", "8:22 B271 '3 * seals' cannot be measured as it stands; put it in brackets, or measure a reward, a counter, a let or ITEM.STATE")]
    [InlineData("total 1 over 1 y", "8:19 B271 '1' cannot be measured as it stands; put it in brackets, or measure a reward, a counter, a let or ITEM.STATE")]
    [InlineData("total (cost) over 1 y", "8:20 B205 'cost' is a reward, which is measured by its bare name; leave out the brackets")]
    [InlineData("probability cost steady", "8:25 B205 'cost' is a reward; a reward stands alone behind expected, average or total")]
    [InlineData("average (cold while seals > 1) steady", "8:22 B271 'cold' is a condition; join two conditions with 'and' rather than 'while'")]
    [InlineData("total cost until seals", "8:30 B220 'seals' is a number; 'until' needs a condition, such as a comparison")]
    [InlineData("probability cold at 3", "8:33 B231 a time of a measure needs a time; '3' is a plain number; write its unit, such as 3 h")]
    [InlineData("probability cold at seals * 1 h", "8:33 B212 'seals' depends on the state; a time of a measure may use numbers and givens only")]
    [InlineData("quantile 5 time to cold", "8:9 B272 the share of this quantile is 5; it lies between 0 and 1, such as 5 %")]
    [InlineData("quantile 5 h time to cold", "8:22 B231 the share of a quantile needs a plain number; '5 h' is a time")]
    public void Bind_WrongMeasure_IsAFault(string text, string message) =>
        Assert.Equal([message], Bound.Faults($"{Store}measure m = {text}"));

    [Fact]
    public void Bind_Sentence_IsOnOneLineWithoutComments() =>
        Assert.Equal(
            "probability cold and seals > 1 at 1 h, 2 h",
            Measure("probability   cold and # both\n    seals > 1  at 1 h, # soon\n 2 h   # late").Sentence);

    [Theory]
    [InlineData("0 h .. 8760 h step 73 h", "h", 1)]
    [InlineData("1 d, 30 d", "d", 24)]
    [InlineData("0, 1 d", "d", 24)]
    [InlineData("1 y .. 10 y log 25", "y", 8760)]
    [InlineData("1 .. 10 y log 25", "y", 8760)]
    [InlineData("1 h, 1 d", "h", 1)]
    [InlineData("0 h .. 1 y step 1 d", "h", 1)]
    [InlineData("mission", "d", 24)]
    public void Bind_TimesOfOneUnit_AreShownInIt(string times, string unit, double factor)
    {
        var measure = Bound.Model($"given mission = 3 d\n{Store}let use = mission\nmeasure m = probability cold at {times}").Measures[0];

        Assert.Equal((unit, factor), (measure.TimesUnit.Text, measure.TimesUnit.Factor));
    }

    [Fact]
    public void Bind_MeasureFormThatIsNone_IsAFault()
    {
        // The parser reads only forms that exist; a tree made elsewhere can have others.
        var parsed = ChainSolve.Language.Parsing.ModelParser.Parse(new("test.chain", Store + "measure m = reliability cold over 1 y"));
        var statements = parsed.Model.Statements.Select(s => s is MeasureSyntax m ? m with { Scope = MeasureScope.Steady, Times = [] } : s);

        var result = ChainSolve.Binding.Binder.Bind(parsed.Model with { Statements = [.. statements] });

        Assert.Equal(["8:9 B270 'reliability' is written with 'over TIMES'"], result.Diagnostics.Select(Bound.Show));
    }
}
