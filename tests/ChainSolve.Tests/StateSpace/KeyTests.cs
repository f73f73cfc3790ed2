using System.Numerics;
using ChainSolve.StateSpace;
using ChainSolve.Tests.Binding;
using FsCheck.Xunit;

namespace ChainSolve.Tests.StateSpace;

public class KeyTests
{
    [Property(MaxTest = 200)]
    public void Pack_RandomMarking_ComesBackFromEitherWidth(int seed)
    {
        var random = new Random(seed);
        int[] counts = [.. Enumerable.Range(0, 5).Select(_ => random.Next(1, 9))];
        var model = Bound.Model(
            string.Concat(counts.Select((c, i) => $"item u{i} x {c} {{ states a, b, c; a -> b at 1 }}\n")) + "item lone { states a, b, c, d; a -> b at 1 }\ncounter n -7 .. 12\n");
        var layout = StateLayout.Of(model, ExploredText.Defaults(model));
        var marking = new int[model.Variables.Count];
        for (var i = 0; i < counts.Length; i++)
        {
            for (var replica = 0; replica < counts[i]; replica++)
            {
                marking[(3 * i) + random.Next(3)]++;
            }
        }

        marking[15 + random.Next(4)] = 1;
        marking[19] = random.Next(-7, 13);
        ComesBack(new KeyCodec<ulong>(layout), marking);
        ComesBack(new KeyCodec<UInt128>(layout), marking);
    }

    [Theory]
    [InlineData(1)]
    [InlineData(20)]
    [InlineData(40)]
    public void Explore_WideKeys_SameChainAsNarrowOnes(int idlers)
    {
        // What cannot move takes three bits each, and changes nothing else.
        static string Text(int count) =>
            "item u x 6 { a -> b at 1; b -> a at 2; b -> c at 1; c -> a at 3 { n = (n + 1) - 3 * floor((n + 1) / 3) } }\ncounter n 0 .. 2\n"
            + string.Concat(Enumerable.Range(0, count).Select(i => $"item idle{i} x 4 {{ states a, b; start a 4; b -> a at 1 }}\n"));

        var narrow = ExploredText.Explore(Text(0)).Generator;
        var wide = ExploredText.Explore(Text(idlers)).Generator;

        Assert.Equal(narrow.StateCount, wide.StateCount);
        Assert.All(Enumerable.Range(0, narrow.StateCount), i => Assert.Equal(narrow.TransitionsFrom(i), wide.TransitionsFrom(i)));
    }

    [Fact]
    public void Explore_KeyBeyond128Bits_IsAFaultThatSaysSo()
    {
        var text = string.Concat(Enumerable.Range(0, 43).Select(i => $"item u{i} x 4 {{ a -> b at 1 }}\n"));
        Assert.Equal(
            "a state of this model takes 129 bits, and 128 is the most that is kept; write alike items as one item with 'x N', or narrow the ranges of counters",
            Assert.Single(Assert.Throws<ModelFaultsException>(() => ExploredText.Explore(text)).Faults).Message);
    }

    private static void ComesBack<TKey>(KeyCodec<TKey> codec, int[] marking)
        where TKey : unmanaged, IBinaryInteger<TKey>
    {
        var back = new int[marking.Length];
        codec.Unpack(codec.Pack(marking), back);
        Assert.Equal(marking, back);
    }
}
