using ChainSolve.Numerics.Tests.Properties;
using ChainSolve.Numerics.Transient;
using ChainSolve.Tests.Shared.Chains;
using ChainSolve.Tests.Shared.Reference;

namespace ChainSolve.Numerics.Tests.Transient;

/// <summary>The matrices before they are rounded to doubles, so that the bounds on two doubles themselves are tried.</summary>
public class TransitionLadderTests
{
    [Fact]
    public void At_AnyLevelOfRandomChains_IsWithinItsBoundAndThatIsSmall()
    {
        var (compared, largest) = (0, 0.0);
        for (var k = 0; k < 66; k++)
        {
            var chain = new ChainMaker(new Random(100 + k)).Make(ChainMaker.Shapes[k % ChainMaker.Shapes.Length], 2 + (k % 5), 1, 10);
            var reached = ReachedChain.Of(chain.Generator(), [.. Enumerable.Repeat(true, chain.Count)]);
            if (reached.LargestExit == 0)
            {
                continue;
            }

            var rewards = WideBlock.FromColumns([chain.Rewards], reached.States, reached.Count);
            var ladder = new TransitionLadder(reached, rewards, keepsAll: true);
            foreach (var level in new[] { 0, 3, 17, 44, 52 })
            {
                var (matrix, totals) = ladder.At(level, CancellationToken.None);
                var time = Math.ScaleB(1, level + ladder.StepPower);
                var truth = chain.Reference.Exponential(time, null, [chain.Rewards]);
                for (var i = 0; i < chain.Count; i++)
                {
                    Check(matrix, i, chain.Count, j => truth[i, j]);
                    Check(totals, i, 1, _ => truth[i, chain.Count]);
                }

                void Check(WideBlock block, int i, int columns, Func<int, BigFloat> expected)
                {
                    for (var j = 0; j < columns; j++)
                    {
                        var value = block[i, j];
                        var bound = ((BigFloat)block.Bound[(i * columns) + j]).TimesPowerOfTwo(-WideBlock.BoundPower);
                        var error = ((BigFloat)value.High + value.Low - expected(j)).Abs;
                        Assert.True(error <= bound + (expected(j) * 1e-45), $"level {level}: {value.High:R} errs by {error}, bound {bound}{chain}");
                        if (expected(j) > 1e-250)
                        {
                            compared++;
                            largest = Math.Max(largest, (bound / expected(j)).ToDouble());
                        }
                    }
                }
            }
        }

        Assert.True(compared > 3000, $"Only {compared} elements were compared.");
        Assert.InRange(largest, 0, 1e-18);
    }

    [Fact]
    public void Split_AnyTime_IsTheSumOfItsParts()
    {
        var random = new Random(5);
        var chain = new ChainMaker(random).Make("dense", 3, 1, 1);
        var ladder = new TransitionLadder(ReachedChain.Of(chain.Generator(), [true, true, true]), new WideBlock(3, 0), keepsAll: false);
        for (var k = 0; k < 2000; k++)
        {
            var time = Math.ScaleB(random.NextDouble(), random.Next(-60, 200));
            var (levels, rest) = ladder.Split(time);
            var sum = levels.Aggregate((BigFloat)rest, (s, level) => s + Math.ScaleB(1, level + ladder.StepPower));

            Assert.True((sum - time).IsZero);
            Assert.InRange(rest, 0, Math.ScaleB(1, ladder.StepPower));
            Assert.Equal(levels.Order(), levels);
        }

        Assert.Empty(ladder.Split(0).Levels);
    }
}
