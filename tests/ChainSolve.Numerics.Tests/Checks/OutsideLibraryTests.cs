using ChainSolve.Numerics.Iteration;
using ChainSolve.Numerics.Tests.Properties;
using ChainSolve.Tests.Shared.Chains;
using MathNet.Numerics.LinearAlgebra;

namespace ChainSolve.Numerics.Tests.Checks;

/// <summary>
/// The solvers against MathNet.Numerics: its dense eigenvalues and its Runge-Kutta method. Both work in plain doubles and lose digits
/// where rates lie far apart, so the chains are mild and the tolerances those of the outside methods.
/// </summary>
public class OutsideLibraryTests
{
    public static TheoryData<int> Seeds => [.. Enumerable.Range(0, 40)];

    [Theory]
    [MemberData(nameof(Seeds))]
    public void Stationary_MildChain_IsTheNullVectorOfTheEigenvalues(int seed)
    {
        var chain = Mild(seed);
        var values = Matrix(chain).Transpose().Evd();
        var at = Enumerable.Range(0, chain.Count).MinBy(i => values.EigenValues[i].Magnitude);
        var vector = values.EigenVectors.Column(at);
        vector /= vector.Sum();

        foreach (var solver in SolverCatalog.Stationary.Where(s => double.IsFinite(s.Cost(chain.Generator()))))
        {
            var result = solver.Solve(chain.Generator(), SolveContext.Default);
            Assert.All(Enumerable.Range(0, chain.Count), i => Assert.Equal(vector[i], result.Probabilities[i], 1e-11));
        }
    }

    /// <summary>A dense irreducible chain with rates within a few powers of ten, and a few jumps in its time.</summary>
    private static RandomChain Mild(int seed)
    {
        var random = new Random(seed);
        var count = random.Next(2, 9);
        return new RandomChain
        {
            Shape = "mild",
            Count = count,
            Moves = [.. from i in Enumerable.Range(0, count) from j in Enumerable.Range(0, count) where i != j select (i, j, 0.02 + random.NextDouble())],
            Start = ChainProblems.Unit(count, random.Next(count)),
            Time = 2 * random.NextDouble(),
            Rewards = new double[count],
        };
    }

    private static Matrix<double> Matrix(RandomChain chain)
    {
        var matrix = CreateMatrix.Dense<double>(chain.Count, chain.Count);
        foreach (var (from, to, rate) in chain.Moves)
        {
            matrix[from, to] += rate;
            matrix[from, from] -= rate;
        }

        return matrix;
    }
}
