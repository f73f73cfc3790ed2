using ChainSolve.Numerics.Iteration;
using ChainSolve.Numerics.Krylov;
using ChainSolve.Numerics.Tests.Properties;
using ChainSolve.Numerics.Tests.Support;
using ChainSolve.Numerics.Transient;
using ChainSolve.Tests.Shared.Chains;

namespace ChainSolve.Numerics.Tests.Transient;

/// <summary>Subspaces against squaring, which proves its bounds.</summary>
public class KrylovSolverTests
{
    [Fact]
    public void Solve_RandomChains_StaysWithinItsBounds() => Compare(300, 77_000);

    [Fact]
    [Trait("Category", "Long")]
    public void Solve_ThousandsOfRandomChains_StaysWithinItsBounds() => Compare(3000, 1_000_000);

    [Fact]
    public void Solve_ChainThatNearlyFallsApart_TakesFewSubspaces()
    {
        // Two rings that hardly know each other: uniformization would take a million steps.
        var moves = new List<(int, int, double)>();
        for (var i = 0; i < 40; i++)
        {
            moves.Add((i, (i / 20 * 20) + ((i + 1) % 20), 1 + (i % 3)));
            moves.Add((i, (i / 20 * 20) + ((i + 19) % 20), 0.5));
        }

        var chain = Chains.Of(40, [.. moves, (3, 27, 1e-5), (30, 9, 2e-5)]);
        var problem = new TransientProblem { Generator = chain, Start = Chains.StartAt(40, 0), Times = [3e5], Rates = [Chains.StartAt(40, 30)] };
        var result = new KrylovSolver().Solve(problem, SolveContext.Default);
        var exact = new SquaringSolver().Solve(problem, SolveContext.Default);

        Assert.InRange(Math.Abs((result.Rates[0][0].Value / exact.Rates[0][0].Value) - 1), 0, 1e-9);
        Assert.False(result.Rates[0][0].IsProved);
        Assert.InRange(int.Parse(result.How.Split(", ")[1].Split(' ')[0], System.Globalization.CultureInfo.InvariantCulture), 1, 1000);
    }

    [Fact]
    public void Solve_OnTwoThreads_HasTheSameDigits()
    {
        var chain = Chains.Lattice([400, 300], (a, l) => 0.3 + (0.1 * a) + (0.01 * l), (a, l) => 1 + (0.2 * a * l));
        var problem = new TransientProblem { Generator = chain, Start = Chains.StartAt(chain.StateCount, 777), Times = [0.2], Rates = [Chains.StartAt(chain.StateCount, 778)] };
        var one = new KrylovSolver().Solve(problem, SolveContext.Default);
        var two = new KrylovSolver().Solve(problem, new SolveContext { Threads = 2 });
        Assert.Equal(one.Rates[0], two.Rates[0]);
    }

    [Fact]
    public void Solve_Cancelled_Stops()
    {
        var chain = Chains.Lattice([40, 30], (_, _) => 1, (_, _) => 2);
        var problem = new TransientProblem { Generator = chain, Start = Chains.StartAt(1200, 0), Times = [1e9], Rates = [Chains.StartAt(1200, 1)] };
        Assert.Throws<OperationCanceledException>(() => new KrylovSolver().Solve(problem, new SolveContext { Cancellation = new CancellationToken(true) }));
    }

    private static void Compare(int count, int seed)
    {
        var close = 0;
        for (var k = 0; k < count; k++)
        {
            var random = new Random(seed + k);
            var chain = new ChainMaker(random).Make(ChainMaker.Shapes[k % ChainMaker.Shapes.Length], random.Next(1, 60), 1e-6, 1e7);
            bool[]? alive = random.Next(2) == 0 ? null : [.. Enumerable.Range(0, chain.Count).Select(_ => random.Next(4) > 0)];
            var problem = chain.Problem(chain.Time, chain.Time / 7, 0) with { Alive = alive };
            var result = new KrylovSolver().Solve(problem, SolveContext.Default);
            var exact = new SquaringSolver().Solve(problem, SolveContext.Default);
            for (var t = 0; t < 3; t++)
            {
                foreach (var (found, right) in new[] { (result.Rates[t][0], exact.Rates[t][0]), (result.Totals[t][0], exact.Totals[t][0]) })
                {
                    Assert.True(Math.Abs(found.Value - right.Value) <= found.Bound + right.Bound, $"{found}, not {right}, of {k}: {chain}");
                    close += found.Bound < 1e-6 * found.Value || found.Value == 0 ? 1 : 0;
                }

                for (var i = 0; i < chain.Count; i++)
                {
                    var off = Math.Abs(result.Distributions![t][i] - exact.Distributions![t][i]);
                    var bound = result.DistributionBounds![t][i] + exact.DistributionBounds![t][i];
                    Assert.True(off <= bound, $"{off} of {bound}, state {i} of {k}, {result.How}: {chain}");
                }
            }
        }

        Assert.InRange(close, 3 * count, 6 * count);
    }
}
