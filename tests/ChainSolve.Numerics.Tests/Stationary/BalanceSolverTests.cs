using ChainSolve.Numerics.Balance;
using ChainSolve.Numerics.Iteration;
using ChainSolve.Numerics.Stationary;
using ChainSolve.Numerics.Tests.Support;
using ChainSolve.Tests.Shared.Chains;
using FsCheck.Fluent;
using FsCheck.Xunit;

namespace ChainSolve.Numerics.Tests.Stationary;

public class BalanceSolverTests
{
    private static readonly BalanceSolver[] Both = [BalanceSolver.BiConjugate, BalanceSolver.MinimalResidual];

    private static readonly double[] Failures = [1e-4, 1e-2, 1];

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
                    continue;
                }

                for (var i = 0; i < chain.Count; i++)
                {
                    Assert.InRange(Chains.Distance(vector.Probabilities[i], expected[i]), 0, vector.RelativeBound);
                }
            }
        });

    [Theory]
    [InlineData("bicgstab", 1)]
    [InlineData("bicgstab", 1e-3)]
    [InlineData("gmres", 1)]
    [InlineData("gmres", 1e-3)]
    public void Solve_ALatticeThatTurns_AgreesWithTheElimination(string name, double slowness)
    {
        // Of the second and the third axis only one goes down at a time, so that balance does not hold pair by pair.
        var whole = Chains.Lattice([12, 9, 7], (a, _) => Failures[a] * slowness, (a, l) => (1 + a) * (l > 3 ? 2 : 1));
        var rates = Enumerable.Range(0, whole.StateCount).SelectMany(
            i => whole.TransitionsFrom(i).Select(t => i - t.To == 108 && i / 12 % 9 > 0 ? t.Rate * slowness / 8 : t.Rate));
        var chain = whole.WithRates([.. rates]);
        var expected = new GthSolver().Solve(chain, SolveContext.Default);
        var vector = Both.First(s => s.Name == name).Solve(chain, SolveContext.Default);

        Assert.InRange(vector.RelativeBound, 0, 1e-9);
        for (var i = 0; i < chain.StateCount; i++)
        {
            Assert.InRange(Chains.Distance(vector.Probabilities[i], expected.Probabilities[i]), 0, vector.RelativeBound + expected.RelativeBound);
        }
    }

    [Fact]
    public void Solve_OneStateAndTwo_AreRight()
    {
        foreach (var solver in Both)
        {
            Assert.Equal([1.0], solver.Solve(Chains.Of(1), SolveContext.Default).Probabilities);
            var two = solver.Solve(Chains.Of(2, (0, 1, 1e-12), (1, 0, 1)), SolveContext.Default).Probabilities;
            Assert.InRange(Chains.Distance(two[1], 1e-12 / (1 + 1e-12)), 0, 1e-15);
        }
    }

    [Fact]
    public void Solve_Cancelled_Throws()
    {
        foreach (var solver in Both)
        {
            Assert.Throws<OperationCanceledException>(
                () => solver.Solve(Chains.Of(2, (0, 1, 1), (1, 0, 1)), new SolveContext { Cancellation = new CancellationToken(true) }));
        }
    }
}
