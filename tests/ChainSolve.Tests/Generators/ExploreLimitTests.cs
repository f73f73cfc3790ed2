using ChainSolve.Generators;
using ChainSolve.Numerics.Iteration;
using ChainSolve.Tests.Binding;
using ChainSolve.Tests.StateSpace;

namespace ChainSolve.Tests.Generators;

/// <summary>Exploring ends where it is told to: by limits, or by its caller.</summary>
public class ExploreLimitTests
{
    private const string Grid = "counter a 0 .. 999\ncounter b 0 .. 999\nevent right at 1 when a < 999 { a = a + 1 }\nevent up at 1 when b < 999 { b = b + 1 }";

    // Thousands of lamps that go four ways at once: more outcomes than can be counted in an hour.
    private const string Flood = "item lamp x 3000 { states on, red, green, blue, off }\nevent surge at 1 { lamp: on -> red 0.25, green 0.25, blue 0.25, off 0.25 all }";

    [Fact]
    public void Build_MoreStatesThanAllowed_SaysWhatWasNeeded() => Assert.Equal(
        "the model has more than the 100 states allowed, 14 of them not looked at yet; raise the limit (MaxStates, --max-states) or write alike things as one item with 'x N'",
        Limit(Grid, 100));

    [Theory]
    [InlineData(12, 4096)]
    [InlineData(40, 10_000)]
    public void Build_MoreDrawnStartsThanAllowed_SaysSo(int items, long allowed)
    {
        var text = string.Concat(Enumerable.Range(0, items).Select(i => $"item u{i} {{ start a 0.5, b 0.5; a -> b at 1 }}\n"));
        if (1L << items <= allowed)
        {
            Assert.Equal(1 << items, ExploredText.Explore(text).States.Count);
            return;
        }

        Assert.Equal(
            "the model starts in more than the 10,000 states allowed, item u13 drawn last; raise the limit (MaxStates, --max-states) or let fewer items start in a drawn state",
            Limit(text, allowed));
    }

    [Fact]
    public void Build_MoreOutcomesOfOneDrawThanFit_SaysSo()
    {
        // The more there is to keep of each outcome, the fewer fit.
        var idlers = string.Concat(Enumerable.Range(0, 20).Select(i => $"item u{i} {{ states a, b, c, d, e, f, g, h }}\n"));
        Assert.Equal("event surge draws more than 203,360 outcomes in one state; let fewer replicas go at once, or to fewer targets", Limit(idlers + Flood, 20_000_000));
    }

    [Fact]
    public void Build_CancelledAmidExploring_Stops()
    {
        using var source = new CancellationTokenSource();
        var told = new List<SolveProgress>();
        Assert.Throws<OperationCanceledException>(() => Build(Grid, 20_000_000, source, p =>
        {
            told.Add(p);
            if (p.Stage == "exploring" && p.Done > 10_000)
            {
                source.Cancel();
            }
        }));
        Assert.InRange(told.Max(p => p.Done), 10_001, 30_000);
    }

    [Fact]
    public void Build_CancelledAmidFilling_Stops()
    {
        using var source = new CancellationTokenSource();
        var told = new List<SolveProgress>();
        Assert.Throws<OperationCanceledException>(() => Build(Grid.Replace("999", "99", StringComparison.Ordinal), 20_000_000, source, p =>
        {
            told.Add(p);
            if (p.Stage == "filling the generator")
            {
                source.Cancel();
            }
        }));
        Assert.Equal(0, Assert.Single(told, p => p.Stage == "filling the generator").Done);
    }

    [Fact]
    public void Build_CancelledAmidOneDraw_Stops()
    {
        using var source = new CancellationTokenSource();

        // The report comes before the first state is looked at; without a look at the token in its draw, the limit of outcomes would end this.
        Assert.Throws<OperationCanceledException>(() => Build(Flood, 20_000_000, source, _ => source.Cancel()));
    }

    private static string Limit(string text, long maxStates)
    {
        using var source = new CancellationTokenSource();
        var exception = Assert.Throws<LimitExceededException>(() => Build(text, maxStates, source, _ => { }));
        Assert.Equal("states", exception.Limit);
        return exception.Message;
    }

    private static ExploredChain Build(string text, long maxStates, CancellationTokenSource source, Action<SolveProgress> told)
    {
        var model = Bound.Model(text);
        return ChainBuilder.Build(
            model, ExploredText.Defaults(model), new ExploreOptions { MaxStates = maxStates }, new SolveContext { Cancellation = source.Token, Progress = new Listener(told) });
    }

    private sealed class Listener(Action<SolveProgress> told) : IProgress<SolveProgress>
    {
        public void Report(SolveProgress value) => told(value);
    }
}
