using System.Globalization;
using ChainSolve.StateSpace;
using ChainSolve.Tests.Binding;
using FsCheck.Xunit;

namespace ChainSolve.Tests.StateSpace;

/// <summary>Keys at the edges of their widths.</summary>
public class KeyEdgeTests
{
    // Moves by shifts of the key, an effect that is worked out, and a guard; eight bits.
    private const string Core = "item u x 6 { a -> b at 1; b -> c at 2; c -> a at 3 }\ncounter n 0 .. 2\nevent e at 1 when u.b > n and n < 2 { n = n + 1; u: b -> c }\nevent f at 2 when n > 0 { n = n - 1 }\n";

    [Theory]
    [InlineData(8, 0)]
    [InlineData(63, 55)]
    [InlineData(64, 56)]
    [InlineData(65, 57)]
    [InlineData(127, 119)]
    [InlineData(128, 120)]
    public void Explore_KeyOfAnyWidth_SameChain(int bits, int padding)
    {
        // What stands before the core takes the upper bits, what stands behind it the lower ones, and neither ever moves.
        var expected = ExploredText.Explore(Core);
        foreach (var text in new[] { Padding(padding) + Core, Core + Padding(padding), Padding(padding / 2) + Core + Padding(padding - (padding / 2), "v") })
        {
            var model = Bound.Model(text);
            var chain = ExploredText.Explore(text);
            Assert.Equal(bits, StateLayout.Of(model, ExploredText.Defaults(model)).Bits);
            Assert.Equal(expected.Start, chain.Start);
            Assert.Equal(expected.Generator.TransitionCount, chain.Generator.TransitionCount);
            Assert.All(
                Enumerable.Range(0, expected.Generator.StateCount), i => Assert.Equal(expected.Generator.TransitionsFrom(i), chain.Generator.TransitionsFrom(i)));
        }
    }

    [Fact]
    public void Explore_KeyOneBitTooWide_IsAFault()
    {
        var fault = Bound.Show(Assert.Single(Assert.Throws<ModelFaultsException>(() => ExploredText.Explore(Core + Padding(121))).Faults));
        Assert.Equal("1:1 S201 a state of this model takes 129 bits, and 128 is the most that is kept; write alike items as one item with 'x N', or narrow the ranges of counters", fault);
    }

    [Theory]
    [InlineData(int.MinValue, int.MinValue + 3L)]
    [InlineData(int.MaxValue - 3L, int.MaxValue)]
    [InlineData(-2, 1)]
    public void Counter_AtTheEndsOfWholeNumbers_CountsThrough(long low, long high)
    {
        var span = string.Create(CultureInfo.InvariantCulture, $"{low} .. {high}");
        ExploredText.Has(
            $"counter n {span}\nevent up at 1 when n < {high} {{ n = n + 1 }}",
            [.. Enumerable.Range(0, 3).Select(i => string.Create(CultureInfo.InvariantCulture, $"n = {low + i} -> n = {low + i + 1} at 1"))]);
    }

    [Fact]
    public void Counter_OfAllWholeNumbers_TakesThirtyTwoBits()
    {
        const string text = "counter n -2147483648 .. 2147483647 start -2147483648\nevent flip at 1 { n = -1 - n }";
        var model = Bound.Model(text);
        Assert.Equal(32, StateLayout.Of(model, ExploredText.Defaults(model)).Bits);
        ExploredText.Has(text, "n = -2147483648 -> n = 2147483647 at 1", "n = 2147483647 -> n = -2147483648 at 1");
    }

    [Theory]
    [InlineData("item u { a -> a at 1 }", 0)]
    [InlineData("item u x 0 { a -> b at 1 }\ncounter n 5 .. 5", 0)]
    [InlineData("item u x 9 { states a }", 0)]
    [InlineData("item u { a -> b at 1; b -> c at 1; c -> d at 1; d -> e at 1 }", 3)]
    [InlineData("item u x 7 { a -> b at 1 }", 3)]
    [InlineData("item u x 8 { a -> b at 1 }", 4)]
    [InlineData("counter n -3 .. 4", 3)]
    [InlineData("counter n -3 .. 5", 4)]
    public void Layout_TakesNoMoreBitsThanNeeded(string text, int bits)
    {
        var model = Bound.Model(text);
        Assert.Equal(bits, StateLayout.Of(model, ExploredText.Defaults(model)).Bits);
    }

    [Property(MaxTest = 100)]
    public void Keys_OrderAsTheMarkingsDo(int seed)
    {
        var random = new Random(seed);
        var model = Bound.Model("item u x 9 { a -> b at 1; b -> c at 1 }\nitem lone { a -> b at 1; b -> c at 1 }\ncounter n -4 .. 3\n");
        var layout = StateLayout.Of(model, ExploredText.Defaults(model));
        var codec = new KeyCodec<UInt128>(layout);
        var (one, other) = (Marking(), Marking());
        Assert.Equal(Digits(one).CompareTo(Digits(other)), codec.Pack(one).CompareTo(codec.Pack(other)));

        int[] Marking()
        {
            var marking = new int[7];
            marking[0] = random.Next(10);
            marking[1] = random.Next(10 - marking[0]);
            marking[2] = 9 - marking[0] - marking[1];
            marking[3 + random.Next(3)] = 1;
            marking[6] = random.Next(-4, 4);
            return marking;
        }

        // The counts of all places but the last, then the place of the lone one, then the counter.
        static int Digits(int[] m) => (((((m[0] * 10) + m[1]) * 3) + Array.IndexOf(m, 1, 3, 3)) * 8) + m[6] + 4;
    }

    private static string Padding(int bits, string name = "w") =>
        string.Concat(Enumerable.Range(0, bits).Select(i => $"item {name}{i} {{ states a, b; b -> a at 1 }}\n"));
}
