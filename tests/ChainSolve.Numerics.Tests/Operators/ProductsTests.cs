using ChainSolve.Numerics.Operators;
using ChainSolve.Numerics.Tests.Support;

namespace ChainSolve.Numerics.Tests.Operators;

public class ProductsTests
{
    private static readonly Generator Small = Chains.Of(3, (0, 1, 1), (0, 2, 2), (1, 2, 3), (2, 0, 4));

    [Fact]
    public void Forward_ARow_IsTheMatrixProduct()
    {
        var y = new double[3];
        Products.Forward(Small, [1, 10, 100], y, 1, default);
        Assert.Equal([400 - 3, 1 - 30, 2 + 30 - 400], y);

        Products.Inflow(Small, [1, 10, 100], y, 1, default);
        Assert.Equal([400, 1, 32], y);
    }

    [Fact]
    public void Backward_AColumn_IsTheMatrixProduct()
    {
        var y = new double[3];
        Products.Backward(Small, [1, 10, 100], y, 1, default);
        Assert.Equal([10 + 200 - 3, 300 - 30, 4 - 400], y);

        Products.Outlook(Small, [1, 10, 100], y, 1, default);
        Assert.Equal([210, 300, 4], y);
    }

    [Theory]
    [InlineData(1)]
    [InlineData(3)]
    public void Products_OnTwoThreads_HaveTheSameDigits(int width)
    {
        var lattice = Chains.Lattice([300, 350], (a, l) => 1 + (0.1 * a) + l, (a, l) => 3.7 * l);
        var random = new Random(5);
        var x = Enumerable.Range(0, lattice.StateCount * width).Select(_ => random.NextDouble()).ToArray();
        var (one, two) = (new double[x.Length], new double[x.Length]);

        Products.ForwardBlock(lattice, x, one, width, 1, default);
        Products.ForwardBlock(lattice, x, two, width, 2, default);
        Assert.Equal(one, two);

        Products.BackwardBlock(lattice, x, one, width, 1, default);
        Products.BackwardBlock(lattice, x, two, width, 2, default);
        Assert.Equal(one, two);
    }

    [Fact]
    public void Block_OfTwoColumns_EqualsEachByItself()
    {
        var block = new double[6];
        Products.BackwardBlock(Small, [1, 5, 10, 6, 100, 7], block, 2, 1, default);
        var (first, second) = (new double[3], new double[3]);
        Products.Backward(Small, [1, 10, 100], first, 1, default);
        Products.Backward(Small, [5, 6, 7], second, 1, default);

        Assert.Equal(first, block.Where((_, k) => k % 2 == 0));
        Assert.Equal(second, block.Where((_, k) => k % 2 == 1));
    }

    [Fact]
    public void Forward_Cancelled_Throws() =>
        Assert.Throws<OperationCanceledException>(() => Products.Forward(Small, [1, 1, 1], new double[3], 1, new CancellationToken(true)));
}
