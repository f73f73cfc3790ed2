using ChainSolve.Numerics.Tests.Support;

namespace ChainSolve.Numerics.Tests.Operators;

public class EliminationOrderTests
{
    [Fact]
    public void Order_OfATridiagonalChain_FillsNothing()
    {
        var chain = Chains.BirthDeath([.. Enumerable.Repeat(1.0, 999)], [.. Enumerable.Repeat(2.0, 999)]);

        Assert.Equal(999, chain.Pattern.Order.Fill);
        Assert.Equal(Enumerable.Range(0, 1000), chain.Pattern.Order.Order!.Order());
    }

    [Fact]
    public void Order_OfAGrid_FillsMuchLessThanItsBand()
    {
        // In its own order a grid of 80 by 80 has a band of 80 entries in each of 6400 rows.
        var chain = Chains.Lattice([80, 80], (_, _) => 1, (_, _) => 2);

        Assert.InRange(chain.Pattern.Order.Fill, 12_640, 80 * 6400 / 3);
        Assert.Equal(Enumerable.Range(0, 6400), chain.Pattern.Order.Order!.Order());
    }

    [Fact]
    public void Order_OfAStar_TakesTheHubLast()
    {
        var moves = Enumerable.Range(1, 50).SelectMany(i => new[] { (0, i, 1.0), (i, 0, 1.0) }).ToArray();
        var order = Chains.Of(51, moves).Pattern.Order;

        Assert.Equal(50, order.Fill);
        Assert.Contains(0, order.Order![^2..]);
    }

    [Fact]
    public void Order_OfALargeSolid_SaysThatItIsTooMuch()
    {
        var order = Chains.Lattice([13, 13, 13, 13], (_, _) => 1, (_, _) => 2).Pattern.Order;

        Assert.Null(order.Order);
        Assert.Equal(double.PositiveInfinity, order.Updates);
    }

    [Fact]
    public void Order_AfterRefill_IsTheSameObject()
    {
        var chain = Chains.Lattice([5, 5], (_, _) => 1, (_, _) => 2);

        Assert.Same(chain.Pattern.Order, chain.WithRates(new double[chain.TransitionCount]).Pattern.Order);
    }
}
