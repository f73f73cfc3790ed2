using ChainSolve.Numerics.Iteration;
using ChainSolve.Numerics.Operators;
using ChainSolve.Numerics.Stationary;
using ChainSolve.Numerics.Tests.Support;
using ChainSolve.Tests.Shared.Chains;
using FsCheck.Fluent;
using FsCheck.Xunit;

namespace ChainSolve.Numerics.Tests.Stationary;

public class SweepSolverTests
{
    private static readonly SweepSolver[] Both = [new("gauss-seidel", false), new("sor", true)];

    [Property(MaxTest = 200)]
    public FsCheck.Property Solve_AnIrreducibleChain_IsWithinItsBoundOrSaysThatItIsNot() =>
        Prop.ForAll(RandomChains.Irreducible(1, 10), chain =>
        {
            var expected = chain.Reference.Stationary([.. Enumerable.Range(0, chain.Count)]);
            foreach (var solver in Both)
            {
                StationaryVector vector;
                try
                {
                    vector = solver.Solve(Chains.Of(chain), SolveContext.Default);
                }
                catch (NotConvergedException)
                {
                    // Nearly uncoupled chains need more sweeps than there are; the next test shows that most do not.
                    continue;
                }

                for (var i = 0; i < chain.Count; i++)
                {
                    var distance = Chains.Distance(vector.Probabilities[i], expected[i]);
                    Assert.True(distance <= vector.RelativeBound, $"{solver.Name} state {i}: {distance} over {vector.RelativeBound}");
                }
            }
        });

    [Fact]
    public void Solve_ManyIrreducibleChains_ConvergesOnMost()
    {
        var solved = 0;
        for (var seed = 0; seed < 300; seed++)
        {
            var chain = new ChainMaker(new Random(seed)).Make(ChainMaker.Shapes[seed % ChainMaker.IrreducibleCount], 10, 1, 10);
            if (RandomChains.IsIrreducible(chain))
            {
                try
                {
                    solved += Both[seed % 2].Solve(Chains.Of(chain), SolveContext.Default).RelativeBound < 1e-9 ? 1 : 0;
                }
                catch (NotConvergedException)
                {
                    continue;
                }
            }
        }

        Assert.InRange(solved, 200, 300);
    }

    [Theory]
    [InlineData(false)]
    [InlineData(true)]
    public void Solve_ALargerChainWithASharedCrew_AgreesWithTheElimination(bool overRelaxes)
    {
        // One crew that always works on the first axis with something to repair: not reversible.
        var chain = Ranked(14);
        var expected = new SparseGthSolver().Solve(chain, SolveContext.Default);
        var actual = new SweepSolver("sweeps", overRelaxes).Solve(chain, SolveContext.Default);

        Assert.InRange(actual.RelativeBound, 0, overRelaxes ? 1e-10 : 1e-11);
        for (var i = 0; i < chain.StateCount; i++)
        {
            Assert.InRange(Chains.Distance(actual.Probabilities[i], expected.Probabilities[i]), 0, actual.RelativeBound + expected.RelativeBound);
        }
    }

    [Fact]
    public void Solve_ABlockPairThatIsHardlyCoupled_IsNoAnswer()
    {
        // Between the blocks the rates are 1e-13: sweeps settle at once inside, and the balance between stays wherever it began.
        var moves = new List<(int, int, double)>();
        for (var i = 0; i < 6; i++)
        {
            moves.Add((i, (i / 3 * 3) + ((i + 1) % 3), 1 + i));
            moves.Add((i, (i / 3 * 3) + ((i + 2) % 3), 0.5));
        }

        moves.AddRange([(0, 4, 1e-13), (5, 1, 7e-13)]);
        var chain = Chains.Of(6, [.. moves]);

        Assert.Throws<NotConvergedException>(() => Both[0].Solve(chain, SolveContext.Default));
    }

    [Fact]
    public void Solve_ARingInEitherDirection_Converges()
    {
        foreach (var step in new[] { 1, 19 })
        {
            var ring = Chains.Of(20, [.. Enumerable.Range(0, 20).Select(i => (i, (i + step) % 20, 1.0 + i))]);
            var vector = Both[0].Solve(ring, SolveContext.Default);

            Assert.InRange(Chains.Distance(vector.Probabilities[0] / vector.Probabilities[19], 20), 0, 1e-13);
        }
    }

    [Fact]
    public void Solve_OnTwoThreads_HasTheSameDigits()
    {
        var chain = Ranked(8);
        var one = Both[0].Solve(chain, SolveContext.Default);
        var two = Both[0].Solve(chain, new SolveContext { Threads = 2 });

        Assert.Equal(one.Probabilities, two.Probabilities);
        Assert.Equal(one.RelativeBound, two.RelativeBound);
    }

    [Fact]
    public void Solve_WithProgress_ReportsAndCanBeCancelled()
    {
        var reports = new List<SolveProgress>();
        using var source = new CancellationTokenSource();
        var context = new SolveContext { Cancellation = source.Token, Progress = new Report(p => { reports.Add(p); source.Cancel(); }) };

        Assert.Throws<OperationCanceledException>(() => Both[0].Solve(Ranked(8), context));
        Assert.Equal("gauss-seidel", reports[0].Stage);
    }

    /// <summary>A million states against the product form, to 1e-10 as is asked of a large lattice.</summary>
    [Fact]
    [Trait("Category", "Long")]
    public void Solve_FiveItemsOfSixteenLevels_IsTheProduct()
    {
        double[] failures = [1e-3, 2e-3, 5e-4, 3e-3, 1e-2];
        double[] repairs = [0.1, 0.05, 0.2, 0.15, 0.08];
        var lattice = Chains.Lattice([16, 16, 16, 16, 16], (a, l) => failures[a] * (15 - l), (a, l) => repairs[a] * l);
        var axes = Enumerable.Range(0, 5).Select(a => new GthSolver().Solve(
            Chains.BirthDeath(
                [.. Enumerable.Range(0, 15).Select(l => failures[a] * (15 - l))], [.. Enumerable.Range(1, 15).Select(l => repairs[a] * l)]),
            SolveContext.Default).Probabilities).ToArray();
        var vector = Both[0].Solve(lattice, SolveContext.Default);

        Assert.Equal(1 << 20, lattice.StateCount);
        var worst = 0.0;
        for (var state = 0; state < lattice.StateCount; state++)
        {
            var expected = 1.0;
            for (var a = 0; a < 5; a++)
            {
                expected *= axes[a][(state >> (4 * a)) & 15];
            }

            worst = Math.Max(worst, Chains.Distance(vector.Probabilities[state], expected));
        }

        Assert.InRange(worst, 0, Math.Min(1e-10, vector.RelativeBound + 1e-15));
    }

    private static Generator Ranked(int side)
    {
        int[] sides = [side, side, side];
        var whole = Chains.Lattice(sides, (a, l) => 0.01 * (a + 1) * (side - 1 - l), (a, _) => 0.3 + (0.2 * a));
        var builder = new GeneratorBuilder(whole.StateCount);
        for (var i = 0; i < whole.StateCount; i++)
        {
            foreach (var (to, rate) in whole.TransitionsFrom(i))
            {
                var axis = Math.Abs(to - i) == 1 ? 0 : Math.Abs(to - i) == side ? 1 : 2;
                var isBusy = (axis > 0 && i % side > 0) || (axis > 1 && i / side % side > 0);
                if (to > i || !isBusy)
                {
                    builder.Add(i, to, rate);
                }
            }
        }

        return builder.Build();
    }

    private sealed class Report(Action<SolveProgress> tell) : IProgress<SolveProgress>
    {
        void IProgress<SolveProgress>.Report(SolveProgress value) => tell(value);
    }
}
