using ChainSolve.Numerics.Iteration;
using ChainSolve.Numerics.Tests.Properties;
using ChainSolve.Tests.Shared.Chains;
using MathNet.Numerics.LinearAlgebra;
using MathNet.Numerics.OdeSolvers;
using Complex = System.Numerics.Complex;

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

    [Theory]
    [MemberData(nameof(Seeds))]
    public void Transient_MildChain_IsThatOfTheEigenvalues(int seed)
    {
        // p(t) = p0 V e^(Λt) V⁻¹; a badly conditioned V is left to the other checks.
        var chain = Mild(seed);
        var values = Matrix(chain).ToComplex().Evd();
        var vectors = values.EigenVectors;
        var decay = CreateMatrix.DenseOfDiagonalVector((values.EigenValues * (Complex)chain.Time).PointwiseExp());
        var condition = vectors.ConditionNumber().Magnitude;
        if (condition > 1e3)
        {
            return;
        }

        var expected = (CreateVector.Dense(chain.Start).ToComplex() * (vectors * decay * vectors.Inverse())).Real();

        SameDistribution(chain, expected, 1e-11);
    }

    [Theory]
    [MemberData(nameof(Seeds))]
    public void Transient_MildChain_IsThatOfRungeKutta(int seed)
    {
        var chain = Mild(seed);
        var matrix = Matrix(chain);
        var steps = RungeKutta.FourthOrder(CreateVector.Dense(chain.Start), 0, chain.Time, 4001, (_, p) => p * matrix);

        SameDistribution(chain, steps[^1], 1e-9);
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

    private static void SameDistribution(RandomChain chain, Vector<double> expected, double tolerance)
    {
        var problem = chain.Problem(chain.Time);
        foreach (var solver in TransientLaws.SolversFor(problem))
        {
            var result = solver.Solve(problem, SolveContext.Default).Distributions![0];
            Assert.All(Enumerable.Range(0, chain.Count), i => Assert.Equal(expected[i], result[i], tolerance));
        }
    }
}
