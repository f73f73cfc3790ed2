using ChainSolve.Numerics.Iteration;
using ChainSolve.Numerics.Multilevel;
using ChainSolve.Numerics.Operators;
using ChainSolve.Numerics.Stationary;
using ChainSolve.Numerics.Tests.Support;
using ChainSolve.Tests.Shared.Chains;
using FsCheck.Fluent;
using FsCheck.Xunit;

namespace ChainSolve.Numerics.Tests.Stationary;

public class MultilevelSolverTests
{
    private static readonly MultilevelSolver Solver = new();

    [Property(MaxTest = 200)]
    public FsCheck.Property Solve_AnIrreducibleChain_IsWithinItsBound() =>
        Prop.ForAll(RandomChains.Irreducible(1, 10), chain =>
        {
            var expected = chain.Reference.Stationary([.. Enumerable.Range(0, chain.Count)]);
            var vector = Solver.Solve(Chains.Of(chain), SolveContext.Default);
            for (var i = 0; i < chain.Count; i++)
            {
                Assert.InRange(Chains.Distance(vector.Probabilities[i], expected[i]), 0, vector.RelativeBound);
            }
        });

    [Theory]
    [InlineData(50)]
    [InlineData(120)]
    [InlineData(400)]
    public void Solve_ManyRandomChainsOfSeveralLevels_AreWithinTheirBounds(int count)
    {
        var refused = 0;
        for (var seed = 0; seed < 40; seed++)
        {
            // Rates over up to eight decades, in a ring with shortcuts or in blocks that hardly meet.
            var random = new Random(seed);
            var decades = seed % 9;
            var builder = new GeneratorBuilder(count);
            for (var i = 0; i < count; i++)
            {
                builder.Add(i, (i + 1) % count, Rate());
                for (var k = 0; k < 1 + (seed % 3); k++)
                {
                    var near = seed % 2 == 0 ? random.Next(count) : (i / 10 * 10) + random.Next(10);
                    builder.Add(i, Math.Min(near, count - 1), 100 * Rate());
                }
            }

            try
            {
                Agrees(builder.Build(), 1e-11);
            }
            catch (NotConvergedException)
            {
                refused++;
            }

            double Rate() => Math.Pow(10, -decades * random.NextDouble());
        }

        // Where nearly everything turns one way round, cycles may not settle; they have to say so, and seldom.
        Assert.InRange(refused, 0, 2);
    }

    [Theory]
    [InlineData(1e-6)]
    [InlineData(1e-10)]
    [InlineData(1e-14)]
    public void Solve_BlocksThatHardlyMeet_AreWithinTheBound(double coupling)
    {
        var builder = new GeneratorBuilder(240);
        for (var i = 0; i < 240; i++)
        {
            var block = i / 24 * 24;
            builder.Add(i, block + ((i + 1) % 24), 1 + (i % 5)).Add(i, block + ((i + 7) % 24), 0.3);
            if (i % 11 == 0)
            {
                builder.Add(i, (i + 61) % 240, coupling * (1 + (i % 3)));
            }
        }

        Agrees(builder.Build(), 1e-11);
    }

    [Theory]
    [InlineData(100)]
    [InlineData(3000)]
    public void Solve_AQueue_IsTheGeometricLaw(int places)
    {
        // M/M/1/K: closed form, rho^k (1 - rho) / (1 - rho^(K + 1)).
        const double Load = 0.9;
        var chain = Chains.BirthDeath([.. Enumerable.Repeat(Load, places)], [.. Enumerable.Repeat(1.0, places)]);
        var vector = Solver.Solve(chain, SolveContext.Default);

        for (var k = 0; k <= places; k++)
        {
            var expected = Math.Pow(Load, k) * (1 - Load) / (1 - Math.Pow(Load, places + 1));
            if (expected > 1e-270)
            {
                Assert.InRange(Chains.Distance(vector.Probabilities[k], expected), 0, vector.RelativeBound + (1e-16 * (k + 4)));
            }
        }
    }

    [Fact]
    public void Solve_BirthsAndDeathsFarApart_KeepsTheDigitsOfTinyProbabilities()
    {
        // Twenty levels of ratio 1e12 up and down again: weights are products of ratios of rates.
        var births = Enumerable.Range(0, 120).Select(i => i % 40 < 20 ? 1e-12 : 1.0).ToArray();
        var deaths = Enumerable.Range(0, 120).Select(i => i % 40 < 20 ? 1.0 : 1e-12).ToArray();

        Agrees(Chains.BirthDeath(births, deaths), 1e-11);
    }

    [Fact]
    public void Solve_AStar_GroupsLeavesThatShareTheirNeighbour()
    {
        var builder = new GeneratorBuilder(5001);
        for (var leaf = 1; leaf <= 5000; leaf++)
        {
            builder.Add(0, leaf, 1.0 / leaf).Add(leaf, 0, 1 + (leaf % 7));
        }

        // Balance leaf by leaf: weight of a leaf against the middle is the ratio of the two rates.
        var vector = Solver.Solve(builder.Build(), SolveContext.Default);
        for (var leaf = 1; leaf <= 5000; leaf++)
        {
            var expected = 1.0 / leaf / (1 + (leaf % 7));
            Assert.InRange(Chains.Distance(vector.Probabilities[leaf] / vector.Probabilities[0], expected), 0, 2 * vector.RelativeBound);
        }
    }

    [Fact]
    public void Solve_APatternWithZeroRates_IgnoresThem()
    {
        var chain = Chains.Lattice([6, 6, 4], (a, l) => 1 + a, (a, l) => 2);
        var rates = Enumerable.Range(0, chain.StateCount).SelectMany(i => chain.TransitionsFrom(i).Select(t => t.To - i == 6 && i % 6 > 0 ? 0 : t.Rate));

        Agrees(chain.WithRates([.. rates]), 1e-11);
    }

    [Fact]
    public void Solve_ARingOnWhichCyclesStandStillAtWrongWeights_IsRefusedOrWithinTheBound()
    {
        // Found by chance among random chains: sweeps and corrections undo each other, so that a change of zero proves nothing.
        var chain = Chains.Of(
            41,
            (0, 1, 9e-05), (1, 28, 0.001), (2, 3, 2e-11), (3, 4, 1e-12), (4, 8, 2e-11), (5, 6, 5e-10),
            (6, 7, 4e-10), (7, 8, 0.5), (8, 13, 0.007), (9, 10, 0.0001), (10, 11, 0.0003), (11, 5, 0.0001),
            (12, 13, 3e-11), (13, 14, 2e-06), (14, 15, 1e-08), (15, 16, 1e-06), (16, 17, 0.0001), (17, 18, 2e-10),
            (18, 0, 0.002), (19, 26, 3e-09), (20, 21, 1e-09), (21, 12, 5e-07), (22, 23, 4e-09), (23, 24, 0.2),
            (24, 25, 8e-12), (25, 26, 3e-10), (26, 27, 1e-08), (26, 34, 5e-09), (26, 39, 0.0003), (27, 28, 8e-07),
            (28, 29, 2e-05), (29, 2, 0.0008), (29, 30, 1e-08), (30, 31, 0.08), (31, 9, 1e-05), (31, 32, 4e-07),
            (32, 20, 1e-08), (32, 33, 1e-05), (33, 37, 1e-09), (34, 35, 4e-09), (35, 36, 0.0002), (36, 19, 0.02),
            (37, 38, 4e-08), (38, 22, 0.002), (39, 40, 2e-06), (40, 37, 0.005));
        try
        {
            Agrees(chain, 1e-9);
        }
        catch (NotConvergedException refusal)
        {
            Assert.NotEmpty(refusal.Message);
        }
    }

    [Fact]
    public void Solve_OneStateAndTwo_AreExact()
    {
        Assert.Equal([1.0], Solver.Solve(Chains.Of(1), SolveContext.Default).Probabilities);
        var two = Solver.Solve(Chains.Of(2, (0, 1, 1e-12), (1, 0, 1)), SolveContext.Default).Probabilities;
        Assert.InRange(Chains.Distance(two[1], 1e-12 / (1 + 1e-12)), 0, 1e-15);
    }

    [Fact]
    public void Solve_AStateThatIsNeverLeft_IsNamed() => Assert.Contains(
        "State 1", Assert.Throws<ArgumentException>(() => Solver.Solve(Chains.Of(2, (0, 1, 1)), SolveContext.Default)).Message, StringComparison.Ordinal);

    [Fact]
    public void Solve_OnTwoThreads_HasTheSameDigits()
    {
        var chain = Chains.Lattice([20, 20, 20], (a, l) => 0.1 * (a + 1), (a, l) => 0.2 * l);
        var one = Solver.Solve(chain, SolveContext.Default);
        var two = Solver.Solve(chain, new SolveContext { Threads = 2 });

        Assert.Equal(one.Probabilities, two.Probabilities);
        Assert.Equal(one.RelativeBound, two.RelativeBound);
    }

    [Fact]
    public void Solve_Cancelled_Throws() => Assert.Throws<OperationCanceledException>(
        () => Solver.Solve(Chains.Of(2, (0, 1, 1), (1, 0, 1)), new SolveContext { Cancellation = new CancellationToken(true) }));

    /// <summary>Compares with the elimination, whose bound is proved.</summary>
    private static void Agrees(Generator chain, double widest)
    {
        var expected = new GthSolver().Solve(chain, SolveContext.Default);
        var vector = Solver.Solve(chain, SolveContext.Default);
        Assert.InRange(vector.RelativeBound, 0, widest);
        for (var i = 0; i < chain.StateCount; i++)
        {
            if (expected.Probabilities[i] > 1e-270)
            {
                Assert.InRange(Chains.Distance(vector.Probabilities[i], expected.Probabilities[i]), 0, vector.RelativeBound + expected.RelativeBound);
            }
        }
    }
}
