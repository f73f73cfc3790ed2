using ChainSolve.Numerics.Iteration;
using ChainSolve.Numerics.Operators;
using ChainSolve.Numerics.Stationary;
using ChainSolve.Numerics.Tests.Support;
using ChainSolve.Tests.Shared.Chains;
using FsCheck.Fluent;
using FsCheck.Xunit;

namespace ChainSolve.Numerics.Tests.Stationary;

public class LongRunTests
{
    [Property(MaxTest = 300)]
    public FsCheck.Property Solve_AnyChain_IsWithinItsBoundOfTheExactLimit() => Prop.ForAll(RandomChains.Any(1, 10), chain =>
    {
        var generator = Chains.Of(chain);
        var expected = chain.Reference.Limit(chain.Start);
        foreach (var method in new[] { null, "gth", "sparse-gth" })
        {
            var result = LongRun.Solve(generator, chain.Start, new SolverOptions { Stationary = method, Absorption = method });
            Assert.True(result.IsProved);
            Assert.InRange(result.RelativeBound, 0, 1e-14);
            for (var i = 0; i < chain.Count; i++)
            {
                Assert.True(Chains.Distance(result.Limit[i], expected[i]) <= result.RelativeBound, $"{method} state {i}: {result.Limit[i]}");
            }

            var reward = result.Expected(chain.Rewards);
            var sum = chain.Rewards.Select((r, i) => expected[i] * r).Aggregate((a, b) => a + b);
            Assert.True((reward.Value - sum).Abs <= reward.Bound);
        }
    });

    [Fact]
    public void Solve_TwoAbsorbingStates_SharesTheStart()
    {
        var result = LongRun.Solve(Chains.Of(3, (1, 0, 3), (1, 2, 1)), [0, 1, 0]);

        Assert.Equal([0.75, 0, 0.25], result.Limit);
        Assert.Equal([[0], [2]], result.Classes.Select(c => c.States));
        Assert.Equal("none", result.StationaryMethod);
        Assert.Equal("gth", result.AbsorptionMethod);
    }

    [Fact]
    public void Solve_AStartInTwoClasses_NeedsNoAbsorption()
    {
        // Case two-classes-mixed-init: each class keeps what it starts with.
        var result = LongRun.Solve(Chains.Of(4, (0, 1, 1), (1, 0, 2), (2, 3, 1e-3), (3, 2, 1e3)), [0.25, 0, 0.75, 0]);

        Assert.Equal("none", result.AbsorptionMethod);
        Assert.Equal(1.0 / 6, result.Limit[0], 1e-16);
        Assert.Equal(0.25, result.Classes[0].Chance.Value);
    }

    [Fact]
    public void Solve_AClassOutOfReach_IsExactlyZero()
    {
        var result = LongRun.Solve(Chains.Of(4, (0, 1, 1), (1, 0, 2), (2, 3, 1), (3, 2, 1)), [1, 0, 0, 0]);

        Assert.Equal([0, 0], result.Limit[2..]);
        Assert.Equal(Numerics.Estimates.Estimate.Zero, result.Probability([false, false, true, true]));
        Assert.Single(result.Classes);
    }

    [Fact]
    public void Solve_OneState_IsCertain()
    {
        var result = LongRun.Solve(Chains.Of(1), [1]);

        Assert.Equal([1], result.Limit);
        Assert.Equal(0, result.RelativeBound);
    }

    [Fact]
    public void Solve_SixtyLevelsOfAMillion_NeitherOverflowsNorLosesDigits()
    {
        // Birth-death: p_i goes as the product of births over deaths, here 1e-6 a level, down to 1e-360.
        var n = 60;
        var chain = Chains.BirthDeath([.. Enumerable.Repeat(1e-6, n)], [.. Enumerable.Repeat(1.0, n)]);
        var reverse = Chains.BirthDeath([.. Enumerable.Repeat(1.0, n)], [.. Enumerable.Repeat(1e-6, n)]);
        foreach (var method in new[] { "gth", "sparse-gth", "detailed-balance" })
        {
            var options = new SolverOptions { Stationary = method };
            var up = LongRun.Solve(chain, Chains.StartAt(n + 1, 0), options);
            var down = LongRun.Solve(reverse, Chains.StartAt(n + 1, 0), options);
            for (var i = 0; i < 51; i++)
            {
                Assert.InRange(Chains.Distance(up.Limit[i], (1 - 1e-6) * Math.Pow(1e-6, i)), 0, 1e-13);
                Assert.InRange(Chains.Distance(down.Limit[n - i], up.Limit[i]), 0, 3e-16);
            }

            Assert.Equal(double.Epsilon, up.Limit[n]);
        }
    }

    [Fact]
    public void Solve_TwoWellsBehindAWallBeyondTheRangeOfADouble_KeepsTheirShares()
    {
        // Both wells are left over thirty steps of 1e-12 against 1: the flow between them is about 1e-360.
        const int Wall = 30;
        var builder = new GeneratorBuilder((2 * Wall) + 1);
        for (var i = 0; i < Wall; i++)
        {
            builder.Add(i, i + 1, 1e-12).Add(i + 1, i, 1);
            builder.Add((2 * Wall) - i, (2 * Wall) - i - 1, 2e-12).Add((2 * Wall) - i - 1, (2 * Wall) - i, 1);
        }

        var chain = builder.Build();
        foreach (var method in new[] { "gth", "sparse-gth" })
        {
            var limit = LongRun.Solve(chain, Chains.StartAt(chain.StateCount, 0), new SolverOptions { Stationary = method }).Limit;
            Assert.InRange(Chains.Distance(limit[0] / limit[2 * Wall], Math.Pow(2, Wall)), 0, 1e-15);
        }
    }

    [Theory]
    [InlineData(new[] { 0.5, 0.4 })]
    [InlineData(new[] { 1.5, -0.5 })]
    [InlineData(new[] { 1.0 })]
    [InlineData(new[] { double.NaN, 1 })]
    public void Solve_AStartThatIsNoDistribution_Throws(double[] start) =>
        Assert.Throws<ArgumentException>(nameof(start), () => LongRun.Solve(Chains.Of(2, (0, 1, 1)), start));

    [Fact]
    public void Solve_AnUnknownMethod_NamesThoseThatThereAre()
    {
        var fault = Assert.Throws<ArgumentException>(
            () => LongRun.Solve(Chains.Of(2, (0, 1, 1), (1, 0, 1)), [1, 0], new SolverOptions { Stationary = "magic" }));

        Assert.Contains("gth, sparse-gth", fault.Message, StringComparison.Ordinal);
    }

    [Fact]
    public void Solve_ASolverOfTheCaller_IsUsed()
    {
        var mine = new Halves();
        var result = LongRun.Solve(
            Chains.Of(2, (0, 1, 1), (1, 0, 1)), [1, 0], new SolverOptions { Stationary = "halves", StationarySolvers = [mine] });

        Assert.Equal("halves", result.StationaryMethod);
        Assert.Equal([0.5, 0.5], result.Limit);
        Assert.False(result.IsProved);
    }

    [Fact]
    public void Solve_AMethodThatFails_GoesOnToTheNext()
    {
        var result = LongRun.Solve(
            Chains.Of(2, (0, 1, 1), (1, 0, 3)),
            [1, 0],
            new SolverOptions { StationarySolvers = [new Halves { Fails = true }, .. StationarySolvers.All.Where(s => s.Name == "sparse-gth")] });

        Assert.Equal("sparse-gth", result.StationaryMethod);
        Assert.Equal([0.75, 0.25], result.Limit);
    }

    private sealed class Halves : IStationarySolver
    {
        public bool Fails { get; init; }

        public string Name => "halves";

        public double Cost(Generator generator) => -1e12;

        public StationaryVector Solve(Generator generator, SolveContext context) => Fails
            ? throw new NotConvergedException("no")
            : new StationaryVector { Probabilities = [0.5, 0.5], RelativeBound = 1e-3, IsProved = false, How = "guess" };
    }
}
