using ChainSolve.Numerics.Iteration;
using ChainSolve.Numerics.Operators;
using ChainSolve.Numerics.Tests.Properties;
using ChainSolve.Numerics.Tests.Support;
using ChainSolve.Numerics.Transient;
using ChainSolve.Tests.Shared.Chains;
using ChainSolve.Tests.Shared.Reference;
using FsCheck.Xunit;
using MathNet.Numerics.LinearAlgebra;

namespace ChainSolve.Numerics.Tests.Transient;

public class TransitionMatrixTests
{
    [Property(MaxTest = 100, Arbitrary = [typeof(StiffChains)])]
    public void Compute_AnyChain_IsTheReferenceToOneRounding(RandomChain chain)
    {
        if (chain.Count > 8)
        {
            return;
        }

        var matrix = TransitionMatrix.Compute(chain.Generator(), chain.Time);
        var truth = chain.Reference.Exponential(chain.Time, null, []);
        for (var i = 0; i < chain.Count; i++)
        {
            for (var j = 0; j < chain.Count; j++)
            {
                var (value, bound, proved) = matrix[i, j];
                Assert.True(proved);
                if (truth[i, j].IsZero)
                {
                    Assert.Equal((0, 0), (value, bound));
                }
                else if (truth[i, j] > 1e-280)
                {
                    Assert.True((value - truth[i, j]).Abs <= bound + (truth[i, j] * 1e-50));
                    Assert.InRange(bound, 0, value * 1.2e-16);
                }
            }
        }
    }

    [Property(MaxTest = 200, Arbitrary = [typeof(StiffChains)])]
    public void Compute_AnyChain_RowsAddToOneAndTimesCompose(RandomChain chain)
    {
        var generator = chain.Generator();
        var one = TransitionMatrix.Compute(generator, chain.Time);
        var two = TransitionMatrix.Compute(generator, 2 * chain.Time);
        for (var i = 0; i < chain.Count; i++)
        {
            Assert.Equal(1, one.Row(i).Sum(), 1e-15 * chain.Count);
            for (var j = 0; j < chain.Count; j++)
            {
                var composed = BigFloat.Zero;
                for (var k = 0; k < chain.Count; k++)
                {
                    composed += (BigFloat)one[i, k].Value * one[k, j].Value;
                }

                // Below the smallest normal numbers digits are lost.
                Assert.True((two[i, j].Value - composed).Abs <= (composed * 5e-16) + 1e-290, $"{i}, {j}: {two[i, j]} and {composed}");
            }
        }
    }

    [Fact]
    public void Compute_AtTimeZeroOrWithoutTransitions_IsTheIdentity()
    {
        foreach (var matrix in new[] { TransitionMatrix.Compute(Chains.Of(2, (0, 1, 3)), 0), TransitionMatrix.Compute(Chains.Of(2), 1e9) })
        {
            Assert.Equal(1, matrix[0, 0].Value);
            Assert.Equal((0, 0), (matrix[0, 1].Value, matrix[0, 1].Bound));
            Assert.Equal([0, 1], matrix.Row(1));
            Assert.NotEmpty(matrix.How);
        }
    }

    [Fact]
    public void Compute_WithWrongArguments_Throws()
    {
        var chain = Chains.Of(2, (0, 1, 1));

        Assert.Throws<ArgumentException>(() => TransitionMatrix.Compute(chain, -1));
        Assert.Throws<ArgumentException>(() => TransitionMatrix.Compute(chain, double.NaN));
        Assert.Throws<ArgumentException>(() => TransitionMatrix.Compute(new GeneratorBuilder(TransitionMatrix.MaxStates + 1).Build(), 1));
        Assert.Throws<ArgumentOutOfRangeException>(() => TransitionMatrix.Compute(chain, 1)[2, 0]);
        Assert.Throws<ArgumentOutOfRangeException>(() => TransitionMatrix.Compute(chain, 1).Row(-1));
        Assert.Throws<OperationCanceledException>(
            () => TransitionMatrix.Compute(chain, 1, new SolveContext { Cancellation = new CancellationToken(true) }));
    }

    [Fact]
    public void Compute_OfASymmetricChain_AgreesWithTheEigenvaluesOfMathNet()
    {
        // Outside reference: exp(Qt) from the dense eigenvalue decomposition of MathNet.Numerics, in plain doubles.
        const int Count = 20;
        var random = new Random(9);
        var half = from i in Enumerable.Range(0, Count) from j in Enumerable.Range(0, i) select (i, j, Rate: random.NextDouble());
        var moves = half.SelectMany(m => new[] { (m.i, m.j, m.Rate), (m.j, m.i, m.Rate) }).ToArray();
        var chain = Chains.Of(Count, moves);
        var eigen = Matrix<double>.Build.Dense(Count, Count, (i, j) => i == j ? -chain.ExitRate(i) : chain.Rate(i, j)).Evd();
        var decays = Matrix<double>.Build.DenseOfDiagonalVector(eigen.EigenValues.Map(v => Math.Exp(0.1 * v.Real)));
        var expected = eigen.EigenVectors * decays * eigen.EigenVectors.Transpose();
        var actual = TransitionMatrix.Compute(chain, 0.1);

        Assert.All(
            from i in Enumerable.Range(0, Count) from j in Enumerable.Range(0, Count) select (i, j),
            p => Assert.Equal(expected[p.i, p.j], actual[p.i, p.j].Value, 1e-14));
    }
}
