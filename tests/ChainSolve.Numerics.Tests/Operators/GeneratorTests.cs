using ChainSolve.Numerics.Operators;
using ChainSolve.Numerics.Tests.Support;

namespace ChainSolve.Numerics.Tests.Operators;

public class GeneratorTests
{
    [Fact]
    public void Build_RatesInAnyOrderAndTwice_AreSortedAndAdded()
    {
        var generator = new GeneratorBuilder(3).Add(2, 0, 5).Add(0, 2, 1).Add(0, 1, 2).Add(0, 2, 0.5).Add(1, 1, 9).Add(1, 0, 0).Build();

        Assert.Equal(3, generator.TransitionCount);
        Assert.Equal([new Transition(1, 2), new Transition(2, 1.5)], generator.TransitionsFrom(0));
        Assert.Empty(generator.TransitionsFrom(1));
        Assert.Equal(1.5, generator.Rate(0, 2));
        Assert.Equal(0, generator.Rate(2, 1));
        Assert.Equal(3.5, generator.ExitRate(0));
        Assert.Equal(5, generator.MaxExitRate);
    }

    [Fact]
    public void Build_ManyRandomRates_EqualsADictionary()
    {
        var random = new Random(1);
        var expected = new Dictionary<(int, int), double>();
        var builder = new GeneratorBuilder(40);
        for (var k = 0; k < 2000; k++)
        {
            var (from, to, rate) = (random.Next(40), random.Next(40), random.NextDouble());
            builder.Add(from, to, rate);
            if (from != to)
            {
                expected[(from, to)] = expected.GetValueOrDefault((from, to)) + rate;
            }
        }

        var generator = builder.Build();
        var actual = Enumerable.Range(0, 40).SelectMany(i => generator.TransitionsFrom(i).Select(t => ((i, t.To), t.Rate))).ToArray();
        Assert.Equal(expected.OrderBy(e => e.Key).Select(e => (e.Key, e.Value)), actual);
    }

    [Theory]
    [InlineData(-1.0)]
    [InlineData(double.NaN)]
    [InlineData(double.PositiveInfinity)]
    public void Add_ARateThatIsNone_Throws(double rate) =>
        Assert.Throws<ArgumentOutOfRangeException>(nameof(rate), () => new GeneratorBuilder(2).Add(0, 1, rate));

    [Fact]
    public void Build_RatesThatOverflowTogether_NamesTheState()
    {
        var builder = new GeneratorBuilder(3).Add(1, 0, 1.7e308).Add(1, 2, 1.7e308);

        Assert.Contains("state 1", Assert.Throws<ArgumentException>(builder.Build).Message, StringComparison.Ordinal);
    }

    [Fact]
    public void WithRates_OtherNumbers_KeepsThePatternInBothDirections()
    {
        var first = Chains.Of(3, (0, 1, 1), (0, 2, 2), (2, 0, 3));
        var second = first.WithRates([10, 0, 30]);

        Assert.Equal(30, second.Rate(2, 0));
        Assert.Equal(0, second.Rate(0, 2));
        Assert.Equal(3, second.TransitionCount);
        Assert.Equal(10, second.ExitRate(0));
        Assert.Same(first.Columns.Targets, second.Columns.Targets);
        Assert.Equal([30, 10, 0], second.Columns.Values);
        Assert.Throws<ArgumentException>("rates", () => first.WithRates([1, 2]));
        Assert.Throws<ArgumentException>("rates", () => first.WithRates([1, -2, 3]));
    }

    [Theory]
    [InlineData(new long[] { 0, 1, 2 }, new[] { 1, 1 }, "State 1")]
    [InlineData(new long[] { 0, 2, 2 }, new[] { 1, 1 }, "do not ascend")]
    [InlineData(new long[] { 0, 1, 2 }, new[] { 1, 2 }, "State 1")]
    [InlineData(new long[] { 0, 3, 2 }, new[] { 1, 0 }, "offsets")]
    [InlineData(new long[] { 0, 1, 3 }, new[] { 1, 0 }, "offsets")]
    public void FromRows_ThatAreNoGenerator_SaysWhere(long[] offsets, int[] targets, string part) =>
        Assert.Contains(part, Assert.Throws<ArgumentException>(() => Generator.FromRows(offsets, targets, [1, 1])).Message, StringComparison.Ordinal);

    [Fact]
    public void Restriction_ToSomeStates_DropsTheRest()
    {
        var whole = Chains.Of(4, (0, 1, 1), (1, 3, 2), (3, 0, 3), (3, 2, 4), (1, 0, 5));
        var part = Restriction.Of(whole, [0, 1, 3]);

        Assert.Equal(4, part.Generator.TransitionCount);
        Assert.Equal(2, part.Generator.Rate(1, 2));
        Assert.Equal(3, part.Generator.Rate(2, 0));
        Assert.Equal([7, 8, 0, 9], part.Spread([7, 8, 9], 4));
        Assert.Equal([1, 2, 4], part.Take([1, 2, 3, 4]));
    }
}
