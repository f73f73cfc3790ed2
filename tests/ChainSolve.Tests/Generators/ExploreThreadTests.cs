using ChainSolve.Expressions;
using ChainSolve.Generators;
using ChainSolve.Numerics.Iteration;
using ChainSolve.Tests.Binding;
using ChainSolve.Tests.StateSpace;
using FsCheck.Xunit;

namespace ChainSolve.Tests.Generators;

/// <summary>What a chain is, and what is told of it, depends neither on the number of threads nor on what is compiled.</summary>
public class ExploreThreadTests
{
    // Some 30,000 states: shifts of the key, two moves that lead the same way, counters that step, a draw, a loop, and effects to be worked out.
    private const string Plant =
        """
        given part = 0.3
        given none = 0
        crew fitter = 2
        item pump x 24 { up -> down at 1; up -> down at 0.1 named wear; down -> up at 2 by fitter; up -> up at 3 }
        item fan x 20 { up -> down at 1 when stock > 0 { stock = stock - 1 }; down -> lost part, up 1 - part - none, down none at 2 by fitter; down -> up 0.2, lost 0.8 at 0.1; lost -> up at 1 }
        counter stock 0 .. 5 start 5
        event order at 0.5 when stock < 5 { stock = stock + 1 }
        event storm at 0.01 { pump: up -> down x 2 if any }
        event count at 0.02 { stock = min(stock + 2, 5) }
        """;

    private const string Grid = "counter a 0 .. 299\ncounter b 0 .. 299\nevent right at 1 when a < 299 { a = a + 1 }\nevent up at 1 when b < 299 { b = b + 1 }";

    [Property(MaxTest = 40)]
    public void Build_RandomModel_SameForAnyThreads(int seed)
    {
        var text = new RandomModelText(seed).Make();
        var expected = Build(text, 1, ExprBackEnd.Interpreted);
        AreSame(expected, Build(text, 1, ExprBackEnd.Compiled));
        AreSame(expected, Build(text, 2, ExprBackEnd.Compiled));
        AreSame(expected, Build(text, 3, ExprBackEnd.Fastest));
        AreSame(expected, Build(text + Idlers(70), 2, ExprBackEnd.Compiled));
    }

    [Theory]
    [InlineData(0)]
    [InlineData(16)]
    [InlineData(50)]
    [InlineData(100)]
    public void Build_LargerModel_SameForAnyThreadsAndKeys(int idlers)
    {
        var expected = Build(Plant, 1, ExprBackEnd.Interpreted);
        Assert.InRange(expected.States.Count, 20_000, 100_000);
        AreSame(expected, Build(Plant + Idlers(idlers), 1, ExprBackEnd.Fastest));
        AreSame(expected, Build(Idlers(idlers) + Plant, 2, ExprBackEnd.Fastest));
        AreSame(expected, Build(Plant + Idlers(idlers), 3, ExprBackEnd.Interpreted));
    }

    [Fact]
    public void Rebuild_LargerModel_SameForAnyThreads()
    {
        var model = Bound.Model("given wear = 0.1\n" + Plant.Replace("at 0.1 named", "at wear named", StringComparison.Ordinal));
        var first = ChainBuilder.Build(model, ExploredText.Defaults(model), new ExploreOptions(), SolveContext.Default);
        foreach (var (wear, part, isRefilled) in new[] { (0.3, 0.3, true), (0.0, 0.7, true), (0.1, 0, true), (0.1, 1, true) })
        {
            var givens = new Modelling.GivenValues([wear, part, 0]);
            var rebuilt = ChainBuilder.Rebuild(first, givens, new ExploreOptions(), new SolveContext { Threads = 2 });
            Assert.Equal(isRefilled, rebuilt.IsRefilled);
            AreSame(ChainBuilder.Build(model, givens, new ExploreOptions(), SolveContext.Default), rebuilt);
        }
    }

    [Theory]
    [InlineData("event end at 1 when a = 120 and b = 80 { a = 300 }")]
    [InlineData("event end at a + b - 200 when a + b >= 150 { a = a - 1 }")]
    [InlineData("event end at 1 when a + b = 200 { b = b + 200 }")]
    [InlineData("event end at 1e308 * max(0, a - 150) { }")]
    [InlineData("item u x 3 { v -> w a/100, z 1 - a/100 at max(0, a - 150) }")]
    [InlineData("item u x 2 { states v, w }\nevent end at max(0, a - 150) { u: v -> w x 3 }")]
    public void Build_ManyFaults_TellsTheSameForAnyThreads(string fault)
    {
        var expected = Fault(Grid + "\n" + fault, 1, ExprBackEnd.Interpreted);
        Assert.Equal(expected, Fault(Grid + "\n" + fault, 1, ExprBackEnd.Compiled));
        Assert.Equal(expected, Fault(Grid + "\n" + fault, 2, ExprBackEnd.Interpreted));
        Assert.Equal(expected, Fault(Grid + "\n" + fault, 3, ExprBackEnd.Interpreted));
    }

    [Theory]
    [InlineData(1)]
    [InlineData(100)]
    [InlineData(40_000)]
    [InlineData(89_999)]
    public void Build_MoreStatesThanAllowed_SaysTheSameForAnyThreads(long allowed)
    {
        string Limit(int threads, ExprBackEnd backEnd) => Assert.Throws<LimitExceededException>(() => Build(Grid, threads, backEnd, allowed)).Message;
        Assert.Equal(Limit(1, ExprBackEnd.Compiled), Limit(1, ExprBackEnd.Interpreted));
        Assert.Equal(Limit(1, ExprBackEnd.Compiled), Limit(2, ExprBackEnd.Interpreted));
        Assert.Equal(Limit(1, ExprBackEnd.Compiled), Limit(3, ExprBackEnd.Interpreted));
    }

    [Fact]
    public void Build_AsManyStatesAsAllowed_IsDone() => Assert.Equal(90_000, Build(Grid, 2, ExprBackEnd.Interpreted, 90_000).States.Count);

    [Theory]
    [InlineData("exploring")]
    [InlineData("filling the generator")]
    public void Build_CancelledWithThreads_Stops(string stage)
    {
        using var source = new CancellationTokenSource();
        var model = Bound.Model(Grid);
        var context = new SolveContext { Threads = 2, Cancellation = source.Token, Progress = new Listener(p => Stop(p, source, stage)) };
        Assert.Throws<OperationCanceledException>(() => ChainBuilder.Build(model, ExploredText.Defaults(model), new ExploreOptions { BackEnd = ExprBackEnd.Interpreted }, context));
    }

    [Fact]
    public void Build_Exploring_TellsSpeedAndMemory()
    {
        var told = new List<SolveProgress>();
        var model = Bound.Model(Grid);
        ChainBuilder.Build(model, ExploredText.Defaults(model), new ExploreOptions(), new SolveContext { Progress = new Listener(told.Add) });
        var last = told.Last(p => p.Stage == "exploring");
        Assert.InRange(last.Done, 80_000, 90_000);
        Assert.Matches("^[0-9,]+ states/s, [0-9,]+ MB$", last.Detail);
    }

    private static void Stop(SolveProgress progress, CancellationTokenSource source, string stage)
    {
        if (progress.Stage == stage && progress.Done > 10_000)
        {
            source.Cancel();
        }
    }

    private static string Idlers(int count) => "\n" + string.Concat(Enumerable.Range(0, count).Select(i => $"item idle{i} {{ states a, b; b -> a at 1 }}\n"));

    private static string Fault(string text, int threads, ExprBackEnd backEnd) =>
        Bound.Show(Assert.Single(Assert.Throws<ModelFaultsException>(() => Build(text, threads, backEnd)).Faults));

    private static ExploredChain Build(string text, int threads, ExprBackEnd backEnd, long maxStates = 20_000_000)
    {
        var model = Bound.Model(text);
        return ChainBuilder.Build(
            model, ExploredText.Defaults(model), new ExploreOptions { BackEnd = backEnd, MaxStates = maxStates }, new SolveContext { Threads = threads });
    }

    private static void AreSame(ExploredChain expected, ExploredChain actual)
    {
        Assert.Equal(expected.Start, actual.Start);
        Assert.Equal(expected.Rows.Offsets, actual.Rows.Offsets);
        Assert.Equal(expected.Rows.Targets, actual.Rows.Targets);
        Assert.Equal(expected.Rows.Rates, actual.Rows.Rates);
        Assert.Equal(expected.Rows.Happens, actual.Rows.Happens.Where((_, t) => !actual.Model.Transitions[t].Label.Contains("idle", StringComparison.Ordinal)));
    }

    private sealed class Listener(Action<SolveProgress> told) : IProgress<SolveProgress>
    {
        public void Report(SolveProgress value) => told(value);
    }
}
