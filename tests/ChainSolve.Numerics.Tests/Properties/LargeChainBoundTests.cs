using ChainSolve.Numerics.Iteration;
using ChainSolve.Numerics.Stationary;
using ChainSolve.Tests.Shared.Chains;
using Xunit.Abstractions;

namespace ChainSolve.Numerics.Tests.Properties;

/// <summary>Iterations on random chains with enough states for several levels of aggregation, against elimination, which proves its bound.</summary>
[Trait("Category", "Long")]
public class LargeChainBoundTests(ITestOutputHelper output)
{
    private const int Count = 2000;

    public static TheoryData<string> Methods => [.. StationarySolvers.All.Select(s => s.Name).Where(n => n is not ("gth" or "sparse-gth" or "detailed-balance"))];

    [Theory]
    [MemberData(nameof(Methods))]
    public void RandomChains_OfFortyToThreeHundredStates_AreWithinTheirBounds(string method)
    {
        var solver = StationarySolvers.All.Single(s => s.Name == method);
        var (refused, worst) = (0, 0.0);
        for (var k = 0; k < Count; k++)
        {
            var random = new Random(9_000_000 + k);
            var chain = new ChainMaker(random).Make(ChainMaker.Shapes[k % ChainMaker.IrreducibleCount], random.Next(41, 301), 1, 1);
            var generator = chain.Generator();
            StationaryVector found;
            try
            {
                found = solver.Solve(generator, SolveContext.Default);
            }
            catch (NotConvergedException)
            {
                refused++;
                continue;
            }

            var exact = new SparseGthSolver().Solve(generator, SolveContext.Default);
            for (var i = 0; i < chain.Count; i++)
            {
                var allowed = (exact.Probabilities[i] * (found.RelativeBound + exact.RelativeBound)) + 1e-300;
                var off = Math.Abs(found.Probabilities[i] - exact.Probabilities[i]);
                worst = Math.Max(worst, off / allowed);
                Assert.True(off <= allowed, $"state {i} of chain {k} ({chain.Shape}, {chain.Count} states): {found.Probabilities[i]:R}, not {exact.Probabilities[i]:R}, bound {found.RelativeBound:G3}, {found.How}");
            }
        }

        output.WriteLine($"{method}: {refused} of {Count} refused, error over bound at most {worst:G3}");
    }
}
