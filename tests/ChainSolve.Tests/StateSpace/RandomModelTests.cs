using ChainSolve.Expressions;
using ChainSolve.Generators;
using ChainSolve.Modelling;
using ChainSolve.Numerics.Iteration;
using ChainSolve.StateSpace;
using ChainSolve.Tests.Binding;
using FsCheck.Xunit;

namespace ChainSolve.Tests.StateSpace;

/// <summary>Random models explored in several ways that must agree.</summary>
public class RandomModelTests
{
    [Property(MaxTest = 80)]
    public void Explore_RandomModel_SameAsReplicaByReplica(int seed)
    {
        var text = new RandomModelText(seed).Make();
        var chain = ExploredText.Explore(text);
        var givens = chain.Givens;
        var starts = StartMarkings.Of(chain.Model, givens, 100).Select(s => s.Marking);
        var expected = new SlowExplorer(chain.Model, givens.AsSpan().ToArray()).Explore(starts);

        Assert.True(expected.Count == chain.States.Count, $"{expected.Count} states instead of {chain.States.Count}\n{text}");
        for (var state = 0; state < chain.States.Count; state++)
        {
            var row = expected[NameOf(chain, state)];
            var moves = chain.Generator.TransitionsFrom(state).ToList();
            Assert.True(row.Count == moves.Count, $"moves out of '{chain.Describe(state)}'\n{text}");
            Assert.All(moves, m => Assert.True(Math.Abs(row[NameOf(chain, m.To)] - m.Rate) <= 1e-13 * m.Rate, $"'{chain.Describe(state)}' -> '{chain.Describe(m.To)}'\n{text}"));
        }
    }

    [Property(MaxTest = 40)]
    public void Explore_RandomModel_SameDigitsByEitherBackEndAndWidth(int seed)
    {
        var text = new RandomModelText(seed).Make();
        var chain = ExploredText.Explore(text);
        AreSame(chain, ExploredText.Explore(text, ExprBackEnd.Interpreted));
        AreSame(chain, ExploredText.Explore(text + string.Concat(Enumerable.Range(0, 70).Select(i => $"item idle{i} {{ states a, b; b -> a at 1 }}\n"))));
    }

    [Property(MaxTest = 40)]
    public void Rebuild_RandomModel_SameDigitsAsAFreshChain(int seed)
    {
        var random = new Random(seed);
        var model = Bound.Model(new RandomModelText(seed).Make());
        var chain = Build(model, [3, 0.25, 0.375]);
        for (var k = 0; k < 4; k++)
        {
            double[] values = [random.Next(4) == 0 ? 0 : random.NextDouble(), random.Next(4) == 0 ? 0 : random.NextDouble(), random.Next(3) / 2.0];
            chain = ChainBuilder.Rebuild(chain, new GivenValues(values), new ExploreOptions(), SolveContext.Default);
            var fresh = Build(model, values);
            AreSame(fresh, chain);
            Assert.Equal(fresh.Warnings.Select(Bound.Show), chain.Warnings.Select(Bound.Show));
        }
    }

    private static ExploredChain Build(BoundModel model, double[] givens) =>
        ChainBuilder.Build(model, new GivenValues(givens), new ExploreOptions(), SolveContext.Default);

    private static void AreSame(ExploredChain expected, ExploredChain actual)
    {
        Assert.Equal(expected.Start, actual.Start);
        for (var state = 0; state < expected.States.Count; state++)
        {
            Assert.Equal(expected.Generator.TransitionsFrom(state), actual.Generator.TransitionsFrom(state));
        }
    }

    private static string NameOf(ExploredChain chain, int state)
    {
        var marking = new int[chain.Model.Variables.Count];
        chain.States.ReadMarking(state, marking);
        return SlowExplorer.Name(marking);
    }
}
