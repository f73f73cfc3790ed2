using ChainSolve.Numerics.Arithmetic;
using ChainSolve.Numerics.Kernels;
using ChainSolve.Tests.Shared.Reference;

namespace ChainSolve.Numerics.Tests.Kernels;

public class DotKernelTests
{
    [Theory]
    [InlineData(0)]
    [InlineData(1)]
    [InlineData(7)]
    [InlineData(8)]
    [InlineData(9)]
    [InlineData(1000)]
    public void Full_AnyLength_IsTheExactSumAndThatOfItsTwin(int count)
    {
        var random = new Random(count);
        double[] values = [.. Enumerable.Range(0, count).Select(_ => random.Next(4) == 0 ? 0 : Math.Pow(10, random.Next(-20, 20)) * random.NextDouble())];
        double[] vector = [.. Enumerable.Range(0, count).Select(_ => Math.Pow(10, -random.Next(0, 60)) * random.NextDouble())];
        int[] places = [.. Enumerable.Range(0, count).Where(i => values[i] > 0)];

        var sum = DotKernel.Full(values, vector);

        Assert.Equal(sum, DotKernel.At(places, [.. places.Select(i => values[i])], vector));
        var truth = values.Zip(vector, (a, b) => (BigFloat)a * b).Aggregate(BigFloat.Zero, (s, x) => s + x);
        Assert.True((sum - truth).Abs <= truth * LongSum.Rounding);
    }
}
