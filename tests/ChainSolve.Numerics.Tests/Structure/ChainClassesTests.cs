using ChainSolve.Numerics.Operators;
using ChainSolve.Numerics.Structure;
using ChainSolve.Numerics.Tests.Support;
using ChainSolve.Tests.Shared.Chains;
using FsCheck.Fluent;
using FsCheck.Xunit;

namespace ChainSolve.Numerics.Tests.Structure;

public class ChainClassesTests
{
    [Fact]
    public void Of_TwoClassesAndTwoAbsorbingStates_FindsAll()
    {
        var chain = Chains.Of(7, (0, 1, 1), (1, 0, 1), (1, 2, 1), (2, 3, 1), (3, 2, 1), (0, 4, 1), (1, 5, 1), (6, 0, 1));
        var classes = ChainClasses.Of(chain);

        Assert.Equal([[2, 3], [4], [5]], classes.Recurrent);
        Assert.Equal([0, 1, 6], classes.Transient);
        Assert.Equal([4, 5], classes.Absorbing);
        Assert.Equal([-1, -1, 0, 0, 1, 2, -1], classes.ClassOf);
        Assert.False(classes.IsIrreducible);
    }

    [Fact]
    public void Of_AMask_CountsRatesOutOfItAsWaysOut()
    {
        var chain = Chains.Of(4, (0, 1, 1), (1, 0, 1), (1, 2, 1), (2, 3, 1), (3, 2, 1));
        var classes = ChainClasses.Of(chain, [true, true, false, false]);

        Assert.Empty(classes.Recurrent);
        Assert.Equal([0, 1], classes.Transient);
        Assert.Equal([-1, -1, -2, -2], classes.ClassOf);
    }

    [Fact]
    public void Of_ARateThatIsStoredAsZero_IsNoWay()
    {
        var chain = Chains.Of(2, (0, 1, 1), (1, 0, 1)).WithRates([1, 0]);

        Assert.Equal([[1]], ChainClasses.Of(chain).Recurrent);
    }

    [Fact]
    public void Of_OneState_IsAnAbsorbingClass() => Assert.True(ChainClasses.Of(Chains.Of(1)).IsIrreducible);

    [Fact]
    public void Of_ALongPath_DoesNotExhaustTheStack()
    {
        const int Count = 1_000_000;
        var offsets = Enumerable.Range(0, Count + 1).Select(i => (long)Math.Min(i, Count - 1)).ToArray();
        var path = Generator.FromRows(offsets, [.. Enumerable.Range(1, Count - 1)], [.. Enumerable.Repeat(1.0, Count - 1)]);
        var classes = ChainClasses.Of(path);

        Assert.Equal([[Count - 1]], classes.Recurrent);
        Assert.Equal(Count - 1, classes.Transient.Length);
    }

    [Property(MaxTest = 300)]
    public FsCheck.Property Of_AnyChain_AgreesWithReachability() => Prop.ForAll(RandomChains.Any(1, 10), chain =>
    {
        var classes = ChainClasses.Of(Chains.Of(chain));
        var expected = chain.Reference.ClosedClasses().OrderBy(c => c[0]).ToArray();
        Assert.Equal(expected, classes.Recurrent);
        Assert.Equal(Enumerable.Range(0, chain.Count).Except(expected.SelectMany(c => c)), classes.Transient);
    });

    [Fact]
    public void Of_AllStates_IsFoundOnce()
    {
        var chain = Chains.Of(3, (0, 1, 1), (1, 2, 1), (2, 0, 1));

        Assert.Same(ChainClasses.Of(chain), ChainClasses.Of(chain));
        Assert.NotSame(ChainClasses.Of(chain), ChainClasses.Of(chain.WithRates([1, 1, 0])));
        Assert.False(ChainClasses.Of(chain.WithRates([1, 1, 0])).IsIrreducible);
    }

    [Property(MaxTest = 300)]
    public FsCheck.Property OneClass_AnyChain_IsProvedOnlyWhereItIs() => Prop.ForAll(RandomChains.Any(1, 10), chain =>
    {
        var isOne = chain.Reference.ClosedClasses().Any(c => c.Length == chain.Count);
        Assert.True(isOne || !OneClass.IsProved(Chains.Of(chain).Rows, CancellationToken.None));
    });

    [Theory]
    [InlineData(1)]
    [InlineData(-1)]
    [InlineData(7)]
    [InlineData(390)]
    public void Of_ARingInAnyOrder_IsOneClass(int stride)
    {
        // Where the numbers run against the ring, sweeps do not get around it and the search does.
        const int Count = 1009;
        var ring = Enumerable.Range(0, Count).Select(i => (i, (i + stride + Count) % Count, 1.0)).ToArray();
        Assert.True(ChainClasses.Of(Chains.Of(Count, ring)).IsIrreducible);
        Assert.Equal(stride is 1 or -1, OneClass.IsProved(Chains.Of(Count, ring).Rows, CancellationToken.None));
    }

    [Property(MaxTest = 200)]
    public FsCheck.Property Reachability_AnyChain_AgreesBothWays() => Prop.ForAll(RandomChains.Any(1, 10), chain =>
    {
        var generator = Chains.Of(chain);
        var expected = chain.Reference.Reachable();
        for (var i = 0; i < chain.Count; i++)
        {
            bool[] only = [.. Enumerable.Range(0, chain.Count).Select(j => j == i)];
            Assert.Equal(Enumerable.Range(0, chain.Count).Select(j => expected[i, j]), Reachability.From(generator, only));
            Assert.Equal(Enumerable.Range(0, chain.Count).Select(j => expected[j, i]), Reachability.To(generator, only));
        }
    });

    [Fact]
    public void Reachability_UnderAMask_GoesAround()
    {
        var chain = Chains.Of(4, (0, 1, 1), (1, 2, 1), (2, 3, 1));

        Assert.Equal([true, false, false, false], Reachability.From(chain, [true, false, false, false], [true, false, true, true]));
        Assert.Equal([false, false, true, true], Reachability.To(chain, [false, false, false, true], [true, false, true, true]));
    }
}
