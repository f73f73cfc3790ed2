using ChainSolve.Numerics.Iteration;
using ChainSolve.Numerics.Tests.Properties;
using ChainSolve.Numerics.Transient;
using ChainSolve.Tests.Shared.Chains;
using ChainSolve.Tests.Shared.Reference;
using Xunit.Abstractions;

namespace ChainSolve.Numerics.Tests.Transient;

/// <summary>True errors against the bounds that come with the values, on random chains and with the slow reference in 256 bits.</summary>
public class TransientBoundTests(ITestOutputHelper output)
{
    [Fact]
    public void Squaring_RandomChains_ErrorsWithinBoundsOfOneRounding() => Compare(new SquaringSolver(), 250, 1, 8, 1e13, 1.2e-16);

    [Fact]
    public void Squaring_VeryLongTimes_ErrorsWithinBoundsOfOneRounding() => Compare(new SquaringSolver(), 60, 2, 6, 1e18, 1.2e-16);

    [Fact]
    [Trait("Category", "Long")]
    public void Squaring_ThousandsOfRandomChains_ErrorsWithinBoundsOfOneRounding() => Compare(new SquaringSolver(), 4000, 3, 12, 1e15, 1.2e-16);

    [Fact]
    public void Uniformization_RandomChains_ErrorsWithinBoundsOfAFewRoundings() => Compare(new UniformizationSolver(), 250, 4, 8, 3e4, 2.5e-15);

    [Fact]
    public void Uniformization_VeryLongTimes_SettlesWithinItsBoundsOrGivesUp() => Compare(Patient, 300, 6, 8, 1e13, 2.5e-15, 0.3);

    [Fact]
    [Trait("Category", "Long")]
    public void Uniformization_VeryLongTimesOnThousandsOfChains_SettlesWithinItsBoundsOrGivesUp() => Compare(Patient, 5000, 7, 12, 1e14, 2e-14, 0.3);

    [Fact]
    [Trait("Category", "Long")]
    public void Uniformization_ThousandsOfRandomChains_ErrorsWithinBoundsOfAFewRoundings() =>
        Compare(new UniformizationSolver(), 3000, 5, 12, 1e5, 2.5e-15);

    // Chains that nearly fall apart may take all steps up to the last time.
    private static UniformizationSolver Patient => new() { MostWork = 2e7 };

    private void Compare(ITransientSolver solver, int count, int seed, int largest, double highRateTime, double relative, double mostGivenUp = 0)
    {
        var tally = new BoundTally();
        var givenUp = 0;
        for (var k = 0; k < count; k++)
        {
            var random = new Random((seed * 1_000_003) + k);
            var chain = new ChainMaker(random).Make(ChainMaker.Shapes[k % ChainMaker.Shapes.Length], random.Next(1, largest + 1), 1e-9, highRateTime);
            bool[]? alive = random.Next(2) == 0 ? null : [.. Enumerable.Range(0, chain.Count).Select(_ => random.Next(4) > 0)];
            var problem = chain.Problem(chain.Time) with { Alive = alive };
            TransientResult result;
            try
            {
                result = solver.Solve(problem, SolveContext.Default);
            }
            catch (NotConvergedException) when (mostGivenUp > 0)
            {
                givenUp++;
                continue;
            }

            var truth = chain.Reference.DistributionAndTotals(chain.Start, chain.Time, [chain.Rewards], alive);
            void Add(string what, double value, double bound, BigFloat expected)
            {
                tally.Add($"{solver.Name} {what}", chain, $"{what} of {k}", value, bound, expected);
                if (expected > 1e-280)
                {
                    // What decays carries the rounding of its rate times the time.
                    var decay = Math.Max(0, -Math.Log(value)) * 4e-16;
                    Assert.True(bound <= value * (relative + decay), $"{what} of {k}: {value:R} has a bound of {bound / value:G3}, true {expected}, alive {string.Join(",", alive ?? [])}, {result.How}{chain}");
                }
            }

            var mean = BigFloat.Zero;
            for (var i = 0; i < chain.Count; i++)
            {
                Add("probability", result.Distributions![0][i], result.DistributionBounds![0][i], truth[i]);
                mean += truth[i] * chain.Rewards[i];
            }

            Add("rate", result.Rates[0][0].Value, result.Rates[0][0].Bound, mean);
            Add("total", result.Totals[0][0].Value, result.Totals[0][0].Bound, truth[chain.Count]);
        }

        output.WriteLine($"{givenUp} of {count} given up");
        output.WriteLine(tally.Summary());
        Assert.InRange(givenUp, 0, mostGivenUp * count);
        tally.HoldsEverywhere((int)(3 * (1 - mostGivenUp) * count));
    }
}
