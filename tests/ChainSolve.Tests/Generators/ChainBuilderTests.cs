using ChainSolve.Expressions;
using ChainSolve.Generators;
using ChainSolve.Modelling;
using ChainSolve.Numerics.Iteration;
using ChainSolve.Numerics.Operators;
using ChainSolve.Tests.Binding;
using ChainSolve.Tests.Properties;
using ChainSolve.Tests.StateSpace;
using FsCheck.Xunit;

namespace ChainSolve.Tests.Generators;

public class ChainBuilderTests
{
    private const string Shop =
        """
        given l = 2
        given m = 3
        given g = 1
        given size = 3
        crew c = 2
        item u x size { up -> down at l; down -> up at m by c; up -> half 0.5, down 0.5 at g { n = min(n + 1, 2) }; half -> up at 1/l when n > 0 }
        counter n 0 .. 2
        event e at g * n when n > 0 { n = n - 1; u: up -> down if any }
        """;

    [Property(MaxTest = 200, Arbitrary = [typeof(ModelSketches)])]
    public void Build_ByEitherBackEnd_SameChain(ModelSketch sketch) =>
        Same(ExploredText.Explore(sketch.AsReplicas(), ExprBackEnd.Compiled), ExploredText.Explore(sketch.AsReplicas(), ExprBackEnd.Interpreted));

    [Theory]
    [InlineData("l", 5, true)]
    [InlineData("m", 1e-9, true)]
    [InlineData("g", 7, true)]
    [InlineData("size", 2, false)]
    [InlineData("g", 0, false)]
    [InlineData("m", 0, false)]
    public void Rebuild_OtherGivens_IsTheFreshChain(string given, double value, bool isRefilled)
    {
        var model = Bound.Model(Shop);
        var first = ChainBuilder.Build(model, ExploredText.Defaults(model), new ExploreOptions(), SolveContext.Default);
        var changed = Changed(model, given, value);

        var rebuilt = ChainBuilder.Rebuild(first, changed, new ExploreOptions(), SolveContext.Default);

        Assert.Equal(isRefilled, rebuilt.IsRefilled);
        Same(ChainBuilder.Build(model, changed, new ExploreOptions(), SolveContext.Default), rebuilt);
    }

    [Fact]
    public void Rebuild_RateThatComesBack_IsTheFreshChain()
    {
        var model = Bound.Model(Shop);
        var without = ChainBuilder.Build(model, Changed(model, "g", 0), new ExploreOptions(), SolveContext.Default);
        var back = ChainBuilder.Rebuild(without, ExploredText.Defaults(model), new ExploreOptions(), SolveContext.Default);

        Assert.False(back.IsRefilled);
        Same(ChainBuilder.Build(model, ExploredText.Defaults(model), new ExploreOptions(), SolveContext.Default), back);
    }

    [Property(MaxTest = 100)]
    public void Rebuild_RandomRates_IsTheFreshChain(int seed)
    {
        var random = new Random(seed);
        var model = Bound.Model(Shop);
        var chain = ChainBuilder.Build(model, ExploredText.Defaults(model), new ExploreOptions(), SolveContext.Default);
        for (var k = 0; k < 4; k++)
        {
            var givens = Changed(model, random.Next(3) switch { 0 => "l", 1 => "m", _ => "g" }, random.Next(5) == 0 ? 0.1 : random.NextDouble());
            chain = ChainBuilder.Rebuild(chain, givens, new ExploreOptions(), SolveContext.Default);
            Same(ChainBuilder.Build(model, givens, new ExploreOptions(), SolveContext.Default), chain);
        }
    }

    [Theory]
    [InlineData("item u x 3 { a -> b at 1; b -> c at 2; c -> a at 3 }\ncounter n 0 .. 1\nevent e at 1 { n = 1 - n }")]
    [InlineData("event e at 1 { n = 1 - n }\ncounter n 0 .. 1\nitem u x 3 { states a, b, c; c -> a at 3; b -> c at 2; a -> b at 1 }")]
    public void Build_StatesAreNumberedByWhatTheyAre(string text)
    {
        var chain = ExploredText.Explore(text);
        var keys = Enumerable.Range(0, chain.States.Count).Select(s =>
        {
            var marking = new int[chain.Model.Variables.Count];
            chain.States.ReadMarking(s, marking);
            return string.Join(' ', marking.Take(3).Concat(marking.Skip(3)));
        }).ToList();

        Assert.Equal(20, keys.Count);
        Assert.Equal(keys.Order(StringComparer.Ordinal), keys);
        Assert.All(Enumerable.Range(0, 20), s => Assert.Equal(s, Found(chain, s)));
    }

    [Fact]
    public void Build_BothOrientations_HoldTheSameRates()
    {
        var generator = ExploredText.Explore(Shop).Generator;
        for (var i = 0; i < generator.StateCount; i++)
        {
            Assert.All(generator.TransitionsFrom(i), t => Assert.Equal(t.Rate, generator.Rate(i, t.To)));
            Assert.Equal(generator.TransitionsFrom(i).Sum(t => t.Rate), generator.ExitRate(i), 1e-15 * generator.ExitRate(i));
        }
    }

    [Fact]
    public void Build_MoreStatesThanAllowed_Stops()
    {
        var model = Bound.Model("item u x 100 { a -> b at 1; b -> a at 1 }");
        var exception = Assert.Throws<LimitExceededException>(
            () => ChainBuilder.Build(model, ExploredText.Defaults(model), new ExploreOptions { MaxStates = 100 }, SolveContext.Default));
        Assert.Equal("states", exception.Limit);
        Assert.Equal(101, ChainBuilder.Build(model, ExploredText.Defaults(model), new ExploreOptions { MaxStates = 101 }, SolveContext.Default).States.Count);
    }

    [Fact]
    public void Build_Cancelled_Stops()
    {
        using var source = new CancellationTokenSource();
        source.Cancel();
        var model = Bound.Model(Shop);
        Assert.Throws<OperationCanceledException>(
            () => ChainBuilder.Build(model, ExploredText.Defaults(model), new ExploreOptions(), new SolveContext { Cancellation = source.Token }));
    }

    private static int Found(ExploredChain chain, int state)
    {
        var marking = new int[chain.Model.Variables.Count];
        chain.States.ReadMarking(state, marking);
        return chain.States.Find(marking);
    }

    private static GivenValues Changed(BoundModel model, string given, double value)
    {
        var values = ExploredText.Defaults(model).AsSpan().ToArray();
        values[model.Givens.ToList().FindIndex(g => g.Name == given)] = value;
        return new GivenValues(values);
    }

    private static void Same(ExploredChain expected, ExploredChain actual)
    {
        Assert.Equal(expected.States.Count, actual.States.Count);
        Assert.Equal(expected.Start, actual.Start);
        Assert.Equal(Rates(expected.Generator), Rates(actual.Generator));
        Assert.Equal(expected.Warnings.Select(w => w.Message), actual.Warnings.Select(w => w.Message));
        Assert.All(Enumerable.Range(0, expected.States.Count), s => Assert.Equal(expected.Describe(s), actual.Describe(s)));
    }

    private static IEnumerable<(int, Transition)> Rates(Generator generator) =>
        Enumerable.Range(0, generator.StateCount).SelectMany(i => generator.TransitionsFrom(i).Select(t => (i, t)));
}
