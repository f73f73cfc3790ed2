namespace ChainSolve.Tests.Binding;

public sealed class TypeTests
{
    private const string Store = "item compressor x 2 { run -> broken at 1/60 d ; broken -> run at 1/8 h }\n";

    [Theory]
    [InlineData("not compressor.run", "B220 'compressor.run' is a number; 'not' needs a condition, such as a comparison")]
    [InlineData("compressor.run and 1 = 1", "B220 'compressor.run' is a number; 'and' needs a condition, such as a comparison")]
    [InlineData("1 = 1 or 3", "B220 '3' is a number; 'or' needs a condition, such as a comparison")]
    [InlineData("count(1 = 1, 3)", "B220 '3' is a number; 'count' needs a condition, such as a comparison")]
    [InlineData("if 3 then 1 else 2", "B220 '3' is a number; 'if' needs a condition, such as a comparison")]
    [InlineData("1 + (1 = 1)", "B221 '(1 = 1)' is a condition; '+' needs a number; count((1 = 1)) is 1 where it holds and 0 elsewhere")]
    [InlineData("-(1 = 1)", "B221 '(1 = 1)' is a condition; '-' needs a number; count((1 = 1)) is 1 where it holds and 0 elsewhere")]
    [InlineData("max(1, 1 = 1)", "B221 '1 = 1' is a condition; 'max' needs a number; count(1 = 1) is 1 where it holds and 0 elsewhere")]
    [InlineData("(1 = 1) = (2 = 2)", "B221 '(1 = 1)' is a condition; only numbers are compared, conditions are joined with 'and', 'or' and 'not'")]
    public void Bind_NumberAndConditionMixed_IsAFault(string expression, string message)
    {
        var fault = Assert.Single(Bound.Faults(Store + "let x = " + expression));

        Assert.Equal(message, fault[(fault.IndexOf(' ', StringComparison.Ordinal) + 1)..]);
    }

    [Fact]
    public void Bind_BranchesOfTwoKinds_IsAFault() =>
        Assert.Equal(
            ["2:9 B222 one branch of this 'if' is a number and the other a condition; both have to be of one kind"],
            Bound.Faults(Store + "let x = if 1 = 1 then 3 else 2 = 2"));

    [Theory]
    [InlineData("if compressor.run > 1 then 5 else 7", 5)]
    [InlineData("count(compressor.run = 2, compressor.broken = 2, not compressor.run = 1)", 2)]
    [InlineData("count(if 1 = 1 then 2 = 2 else 3 = 4)", 1)]
    [InlineData("choose(5, 2)", 10)]
    [InlineData("min(3, 1, 2) + max(3, 1, 2) + abs(-4)", 8)]
    [InlineData("round(2.5) + round(-2.5) + floor(1.5) + ceil(1.5)", 3)]
    [InlineData("exp(0) + ln(1) + sqrt(9)", 4)]
    [InlineData("-2^2 + 2^3^2", 508)]
    [InlineData("10 - 3 - 2 + 8 / 4 / 2", 6)]
    [InlineData("compressor.run * 3", 6)]
    public void Bind_Expression_HasItsValue(string expression, double value) =>
        Assert.Equal(value, Bound.Probe(Store + "let probe = " + expression, ("compressor.run", 2)));

    [Fact]
    public void Bind_IsOnASingleItem_IsACondition()
    {
        const string text = "item mains { on -> off at 3 per y ; off -> on at 1/2 h }\nlet probe = count(mains is on) + 2 * count(not mains is on)";

        Assert.Equal(1, Bound.Probe(text, ("mains.on", 1)));
        Assert.Equal(2, Bound.Probe(text, ("mains.off", 1)));
    }

    [Fact]
    public void Bind_IsOnReplicas_TellsWhatToWrite() =>
        Assert.Equal(
            ["2:12 B213 'compressor' is declared with 'x', so 'is' has no answer; write compressor.run >= 1 or compressor.run = 0"],
            Bound.Faults(Store + "let cold = compressor is run"));

    [Fact]
    public void Bind_LongChains_AreFlat()
    {
        var sum = string.Join(" + ", Enumerable.Repeat("1", 50_000));
        var any = string.Join(" or ", Enumerable.Repeat("compressor.run = 7", 50_000));

        Assert.Equal(50_000, Bound.Probe($"{Store}let any = {any}\nlet probe = {sum} + count(any)"));
    }
}
