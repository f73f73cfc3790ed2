using ChainSolve.Numerics.Kernels;
using ChainSolve.Numerics.Operators;
using ChainSolve.Numerics.Tests.Support;

namespace ChainSolve.Numerics.Tests.Kernels;

/// <summary>The vectorised step against its twin, digit for digit, on shapes that try its edges.</summary>
public class StepKernelTests
{
    public static TheoryData<int> Sizes => [1, 2, 7, 8, 9, 15, 16, 17, 63, 64, 65, 200];

    [Theory]
    [MemberData(nameof(Sizes))]
    public void Step_BandedChainOfAnySize_SameDigitsAsOnRows(int count) =>
        SameDigits(Banded(count, new Random(count)), All(count), new Random(count + 1));

    [Theory]
    [MemberData(nameof(Sizes))]
    public void Step_SomeStatesLeftOut_SameDigitsAndZerosThere(int count)
    {
        var random = new Random(count + 7);
        bool[] among = [.. Enumerable.Range(0, count).Select(_ => random.Next(5) > 0)];
        SameDigits(Banded(count, random), among, random);
    }

    [Fact]
    public void Step_ElementsNextToNothing_SameDigitsAndDropsCounted() =>
        Assert.True(SameDigits(Banded(200, new Random(3)), All(200), new Random(4), -304, -297) > 0);

    [Fact]
    public void TryBuild_Lattice_TakesNextToNoRoom()
    {
        var lattice = Chains.Lattice([16, 16, 16], (a, l) => (a + 1) * 1e-3 * (15 - l), (a, l) => 0.1 * (a + 1) * l);
        var diagonals = ChunkedDiagonals.TryBuild(lattice.Columns, All(lattice.StateCount), CancellationToken.None)!;

        Assert.InRange(diagonals.Offsets.Length * 8.0 / lattice.TransitionCount, 1, 1.1);
        SameDigits(lattice, All(lattice.StateCount), new Random(5));
    }

    [Fact]
    public void TryBuild_RandomPattern_IsRefused()
    {
        var random = new Random(6);
        var builder = new GeneratorBuilder(5000);
        for (var k = 0; k < 40_000; k++)
        {
            builder.Add(random.Next(5000), random.Next(5000), 1);
        }

        var generator = builder.Build();
        Assert.Null(ChunkedDiagonals.TryBuild(generator.Columns, All(5000), CancellationToken.None));
        Assert.IsType<RowKernel>(StepKernels.For(generator.Columns, All(5000), 1_000_000, CancellationToken.None));
    }

    [Theory]
    [InlineData(VectorTable.MostCodes, true)]
    [InlineData(VectorTable.MostCodes + 1, false)]
    public void TryBuild_AsManyDifferentRatesAsCodes_IsLaidOutAndOneMoreIsNot(int chunks, bool fits)
    {
        // One source a state, at the same offset, and rates that are alike within a chunk only.
        var builder = new GeneratorBuilder((chunks * 8) + 8);
        for (var i = 0; i < chunks * 8; i++)
        {
            builder.Add(i, i + 8, 1 + (i / 8));
        }

        var generator = builder.Build();
        Assert.Equal(fits, ChunkedDiagonals.TryBuild(generator.Columns, All(generator.StateCount), CancellationToken.None) is not null);
    }

    [Fact]
    public void TryBuild_ZeroRatesOfAPattern_AreLeftOut()
    {
        var whole = Banded(64, new Random(8));
        var rates = Enumerable.Range(0, 64).SelectMany(whole.TransitionsFrom).Select((t, k) => k % 3 == 0 ? 0 : t.Rate).ToArray();
        SameDigits(whole.WithRates(rates), All(64), new Random(9));
    }

    private static bool[] All(int count) => [.. Enumerable.Repeat(true, count)];

    private static Generator Banded(int count, Random random)
    {
        int[] offsets = [-11, -8, -3, -1, 1, 2, 8, 13];
        var builder = new GeneratorBuilder(count);
        for (var i = 0; i < count; i++)
        {
            foreach (var offset in offsets.Where(o => i + o >= 0 && i + o < count && random.Next(6) > 0))
            {
                builder.Add(i, i + offset, Math.Pow(10, random.Next(-3, 3)) * (1 + random.Next(3)));
            }
        }

        return builder.Build();
    }

    /// <summary>Takes five steps by both kernels, in one double and in two; the number of elements that were dropped.</summary>
    private static int SameDigits(Generator generator, bool[] among, Random random, double lowest = -3, double highest = 0)
    {
        var count = generator.StateCount;
        var diagonals = ChunkedDiagonals.TryBuild(generator.Columns, among, CancellationToken.None);
        if (diagonals is null)
        {
            Assert.True(count < 64 || among.Contains(false), "A band is regular enough.");
            return 0;
        }

        double[] start = [.. among.Select(a => a ? Math.Pow(10, lowest + ((highest - lowest) * random.NextDouble())) : 0)];
        var q = (1.02 * generator.MaxExitRate) + 0.1;
        double[] stays = [.. generator.ExitRates.Select((e, i) => among[i] ? q - e : 0), .. new double[StepVectors.Lanes]];
        var dropped = 0;
        foreach (var isWide in new[] { false, true })
        {
            var scale = new StepScale(stays, isWide ? [.. stays.Select(s => s * 1e-17)] : [], 1 / q);
            var (one, two) = (new StepVectors(count, isWide), new StepVectors(count, isWide));
            start.CopyTo(one.Read);
            start.CopyTo(two.Read);
            for (var k = 0; k < 5; k++)
            {
                var (onRows, onChunks) = (Step(new RowKernel(generator.Columns), one, scale), Step(new ChunkKernel(diagonals), two, scale));
                Assert.Equal(onRows, onChunks);
                Assert.Equal(one.To, two.To);
                Assert.Equal(one.ToLow, two.ToLow);
                Assert.All(Enumerable.Range(0, count).Where(i => !among[i]), i => Assert.Equal(0, two.To[i + StepVectors.Lanes]));
                dropped += onChunks.Dropped;
                one.Swap();
                two.Swap();
            }
        }

        return dropped;
    }

    private static StepTally Step(IStepKernel kernel, StepVectors vectors, StepScale scale) =>
        scale.StaysLow.Length > 0 ? kernel.Wide(vectors, scale, 0, vectors.Count) : kernel.Plain(vectors, scale, 0, vectors.Count);
}
