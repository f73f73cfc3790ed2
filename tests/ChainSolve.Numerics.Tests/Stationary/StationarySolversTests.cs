using ChainSolve.Numerics.Iteration;
using ChainSolve.Numerics.Multilevel;
using ChainSolve.Numerics.Operators;
using ChainSolve.Numerics.Stationary;
using ChainSolve.Numerics.Tests.Support;
using MathNet.Numerics.LinearAlgebra;

namespace ChainSolve.Numerics.Tests.Stationary;

public class StationarySolversTests
{
    private static readonly double[] Ups = [0.01, 0.3, 2];

    private static Generator Random(int count, int extra, int seed)
    {
        var random = new Random(seed);
        var builder = new GeneratorBuilder(count);
        for (var i = 0; i < count; i++)
        {
            builder.Add(i, (i + 1) % count, 0.1 + random.NextDouble());
            for (var k = 0; k < extra; k++)
            {
                builder.Add(i, random.Next(count), random.NextDouble());
            }
        }

        return builder.Build();
    }

    [Fact]
    public void Gth_ABenignChain_AgreesWithTheEigenvectorOfMathNet()
    {
        // Outside reference: the dense eigenvalue decomposition of MathNet.Numerics.
        var chain = Random(40, 4, 1);
        var matrix = Matrix<double>.Build.Dense(40, 40, (i, j) => i == j ? -chain.ExitRate(i) : chain.Rate(i, j));
        var eigen = matrix.Transpose().Evd();
        var at = Enumerable.Range(0, 40).MinBy(k => eigen.EigenValues[k].Magnitude);
        var vector = eigen.EigenVectors.Column(at);
        var expected = vector / vector.Sum();
        var actual = new GthSolver().Solve(chain, SolveContext.Default);

        for (var i = 0; i < 40; i++)
        {
            Assert.InRange(Chains.Distance(actual.Probabilities[i], expected[i]), 0, 1e-12);
        }
    }

    [Theory]
    [InlineData(150, 3)]
    [InlineData(300, 1)]
    public void SparseGth_AMediumChain_AgreesWithTheDenseOne(int count, int extra)
    {
        var chain = Random(count, extra, 2);
        var dense = new GthSolver().Solve(chain, SolveContext.Default);
        var sparse = new SparseGthSolver().Solve(chain, SolveContext.Default);

        for (var i = 0; i < count; i++)
        {
            Assert.InRange(Chains.Distance(sparse.Probabilities[i], dense.Probabilities[i]), 0, dense.RelativeBound + sparse.RelativeBound);
        }
    }

    [Theory]
    [InlineData("sparse-gth")]
    [InlineData("detailed-balance")]
    public void Solve_ALatticeOfIndependentItems_IsTheProduct(string method)
    {
        // Independent birth-death chains: the stationary vector is the product of theirs.
        int[] sides = [20, 15, 12];
        double Up(int axis, int level) => Ups[axis] * (20 - level);
        double Down(int axis, int level) => (1 + axis) * Math.Min(level, 2);
        var lattice = Chains.Lattice(sides, Up, Down);
        var axes = sides.Select((side, axis) => new GthSolver().Solve(
            Chains.BirthDeath(
                [.. Enumerable.Range(0, side - 1).Select(l => Up(axis, l))], [.. Enumerable.Range(1, side - 1).Select(l => Down(axis, l))]),
            SolveContext.Default).Probabilities).ToArray();
        var result = StationarySolvers.Select(lattice, method).Solver.Solve(lattice, SolveContext.Default);

        Assert.True(result.IsProved);
        for (var state = 0; state < lattice.StateCount; state++)
        {
            var expected = axes[0][state % 20] * axes[1][state / 20 % 15] * axes[2][state / 300];
            Assert.InRange(Chains.Distance(result.Probabilities[state], expected), 0, 1e-15);
        }
    }

    [Fact]
    public void DetailedBalance_AChainThatTurnsOneWay_DeclinesAndSaysSo()
    {
        var ring = Chains.Of(3, (0, 1, 1), (1, 2, 1), (2, 0, 1), (1, 0, 2), (2, 1, 2), (0, 2, 2));
        var solver = new DetailedBalanceSolver();

        Assert.Equal(double.PositiveInfinity, solver.Cost(ring));
        Assert.Contains("not reversible", Assert.Throws<NotConvergedException>(() => solver.Solve(ring, SolveContext.Default)).Message, StringComparison.Ordinal);
    }

    [Fact]
    public void Select_ByStructureAndSize_GivesItsReason()
    {
        Assert.Equal("gth", StationarySolvers.Select(Random(30, 2, 3)).Solver.Name);
        Assert.Equal("sparse-gth", StationarySolvers.Select(Random(900, 1, 3)).Solver.Name);
        Assert.Equal("detailed-balance", StationarySolvers.Select(Chains.Lattice([40, 40, 40], (_, _) => 1, (_, _) => 2)).Solver.Name);
        Assert.Contains("reversible", StationarySolvers.Select(Chains.Lattice([10, 10], (_, _) => 1, (_, _) => 2)).Why, StringComparison.Ordinal);
        Assert.Equal("asked for by name", StationarySolvers.Select(Random(30, 2, 3), "sparse-gth").Why);
    }

    [Fact]
    public void Rank_WithoutEliminations_LeavesSlowSweepsForCyclesOfAggregation()
    {
        // A queue under heavy load: sweeps need tens of thousands of cycles.
        var queue = Chains.Lattice([300, 2], (a, _) => a == 0 ? 0.99 : 0.01, (a, l) => a == 0 && l > 150 ? 1.01 : 1);
        var ranked = StationarySolvers.Rank(queue, null, [.. StationarySolvers.All.Where(s => s is SweepSolver or MultilevelSolver)]);
        var (vector, choice) = Attempts.First(ranked, s => s.Solve(queue, SolveContext.Default), s => s.Name);
        var expected = new GthSolver().Solve(queue, SolveContext.Default);

        Assert.Equal(["gauss-seidel", "multilevel", "sor"], ranked.Select(r => r.Solver.Name));
        Assert.Equal("multilevel", choice.Solver.Name);
        Assert.Contains("slower than other methods", choice.Why, StringComparison.Ordinal);
        Assert.InRange(Chains.Distance(vector.Probabilities[0], expected.Probabilities[0]), 0, vector.RelativeBound + expected.RelativeBound);
    }

    [Theory]
    [InlineData("gth")]
    [InlineData("sparse-gth")]
    public void Solve_AChainOfTwoClasses_NamesAState(string method)
    {
        var chain = Chains.Of(4, (0, 1, 1), (1, 0, 1), (2, 3, 1), (3, 2, 1));

        Assert.Contains("never left", Assert.Throws<ArgumentException>(
            () => StationarySolvers.Select(chain, method).Solver.Solve(chain, SolveContext.Default)).Message, StringComparison.Ordinal);
    }

    [Theory]
    [InlineData("gth")]
    [InlineData("sparse-gth")]
    [InlineData("detailed-balance")]
    public void Solve_Cancelled_Throws(string method) => Assert.Throws<OperationCanceledException>(
        () => StationarySolvers.Select(Chains.Of(2, (0, 1, 1), (1, 0, 1)), method).Solver.Solve(
            Chains.Of(2, (0, 1, 1), (1, 0, 1)), new SolveContext { Cancellation = new CancellationToken(true) }));
}
