using ChainSolve.StateSpace;
using FsCheck.Xunit;

namespace ChainSolve.Tests.StateSpace;

public class BinomialLawTests
{
    // Source: exact rational arithmetic (Python's fractions and math.comb), rounded once.
    [Theory]
    [InlineData(1000, 500, 0.5, 0.025225018178360802)]
    [InlineData(5000, 40, 0.0009765625, 2.9012560776065892e-23)]
    [InlineData(1500, 1300, 0.5, 5.5058238082039900e-198)]
    public void Chance_ManyReplicas_IsExactToARoundingEach(int count, int taken, double goes, double expected) =>
        Assert.Equal(expected, BinomialLaw.Chance(count, taken, goes, 1 - goes), 2e-16 * count * expected);

    [Theory]
    [InlineData(3, 0, 0, 1, 1)]
    [InlineData(3, 1, 0, 1, 0)]
    [InlineData(3, 3, 1, 0, 1)]
    [InlineData(3, 2, 1, 0, 0)]
    [InlineData(0, 0, 0.5, 0.5, 1)]
    [InlineData(4, 1, 0.25, 0.75, 0.421875)]
    public void Chance_SureOrFew_IsExact(int count, int taken, double goes, double stays, double expected)
    {
        Assert.Equal(expected, BinomialLaw.Chance(count, taken, goes, stays));
        Assert.Equal(expected, BinomialLaw.Chances(count, goes, stays)[taken]);
    }

    [Property(MaxTest = 50)]
    public void Chance_AllNumbers_AddToOne(int seed)
    {
        var random = new Random(seed);
        var (count, goes) = (random.Next(0, 1000), Math.Pow(random.NextDouble(), 8));
        var chances = BinomialLaw.Chances(count, goes, 1 - goes);
        Assert.Equal(1, chances.Sum(), 1e-12);
        for (var k = 0; k <= count; k++)
        {
            var alone = BinomialLaw.Chance(count, k, goes, 1 - goes);
            Assert.Equal(alone, chances[k], (1e-15 * (count + 10) * alone) + 1e-300);
        }
    }
}
