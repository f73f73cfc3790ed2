using ChainSolve.Numerics.Absorption;
using ChainSolve.Numerics.Iteration;
using ChainSolve.Numerics.Tests.Checks;
using ChainSolve.Tests.Shared.Chains;
using ChainSolve.Tests.Shared.Reference;
using Xunit.Abstractions;

namespace ChainSolve.Numerics.Tests.Properties;

/// <summary>True errors against the bounds that come with the values, on random chains and with the slow reference.</summary>
public class BoundTests(ITestOutputHelper output)
{
    private const int Usual = 300;

    private const int Many = 4000;

    private static readonly (int Least, int Most) Small = (1, 12);

    private static readonly (int Least, int Most) Larger = (13, 30);

    [Fact]
    public void Transient_LargerRandomChains_ErrorsWithinBounds() => Transient(Usual / 15, seed: 7, Larger, 1e4);

    [Fact]
    [Trait("Category", "Long")]
    public void Transient_HundredsOfLargerRandomChains_ErrorsWithinBounds() => Transient(Many / 20, seed: 8, Larger, 1e13);

    [Fact]
    public void Stationary_RandomChains_ErrorsWithinBounds() => Stationary(2 * Usual, seed: 3);

    [Fact]
    [Trait("Category", "Long")]
    public void Stationary_ThousandsOfRandomChains_ErrorsWithinBounds() => Stationary(Many, seed: 4);

    [Fact]
    public void Absorption_RandomChains_ErrorsWithinBounds() => Absorption(2 * Usual, seed: 5);

    [Fact]
    [Trait("Category", "Long")]
    public void Absorption_ThousandsOfRandomChains_ErrorsWithinBounds() => Absorption(Many, seed: 6);

    private static IEnumerable<(RandomChain Chain, Random Random)> Chains(
        int count, int seed, string[] shapes, (int Least, int Most) sizes, double highRateTime)
    {
        for (var k = 0; k < count; k++)
        {
            var random = new Random((seed * 1_000_003) + k);
            yield return (new ChainMaker(random).Make(shapes[k % shapes.Length], random.Next(sizes.Least, sizes.Most + 1), 1e-9, highRateTime), random);
        }
    }

    private void Transient(int count, int seed, (int Least, int Most) sizes, double highRateTime)
    {
        var tally = new BoundTally();
        foreach (var (chain, random) in Chains(count, seed, ChainMaker.Shapes, sizes, highRateTime))
        {
            var alive = random.Next(2) == 0 ? null : Enumerable.Range(0, chain.Count).Select(_ => random.Next(4) > 0).ToArray();
            var problem = chain.Problem(chain.Time) with { Alive = alive };
            BigFloat[]? truth = null;
            foreach (var solver in SolverCatalog.Transient.Where(s => s.Cost(problem) < 3e7))
            {
                truth ??= chain.Reference.DistributionAndTotals(chain.Start, chain.Time, [chain.Rewards], alive);
                var result = solver.Solve(problem, SolveContext.Default);
                var rate = BigFloat.Zero;
                for (var i = 0; i < chain.Count; i++)
                {
                    tally.Add($"{solver.Name} distribution", chain, $"p[{i}]", result.Distributions![0][i], result.DistributionBounds![0][i], truth[i]);
                    rate += truth[i] * chain.Rewards[i];
                }

                tally.Add($"{solver.Name} rate", chain, "rate", result.Rates[0][0].Value, result.Rates[0][0].Bound, rate);
                tally.Add($"{solver.Name} total", chain, "total", result.Totals[0][0].Value, result.Totals[0][0].Bound, truth[chain.Count]);
            }
        }

        output.WriteLine(tally.Summary());
        tally.HoldsEverywhere(8 * count);
    }

    private void Stationary(int count, int seed)
    {
        var tally = new BoundTally();
        foreach (var (chain, _) in Chains(count, seed, ChainMaker.Shapes[..ChainMaker.IrreducibleCount], Small, 1).Where(c => RandomChains.IsIrreducible(c.Chain)))
        {
            var generator = chain.Generator();
            var truth = chain.Reference.Stationary([.. Enumerable.Range(0, chain.Count)]);
            foreach (var solver in SolverCatalog.Stationary.Where(s => double.IsFinite(s.Cost(generator))))
            {
                try
                {
                    var result = solver.Solve(generator, SolveContext.Default);
                    for (var i = 0; i < chain.Count; i++)
                    {
                        var value = result.Probabilities[i];
                        tally.Add(solver.Name, chain, $"pi[{i}]", value, value * result.RelativeBound, truth[i]);
                    }
                }
                catch (NotConvergedException)
                {
                    // A plain refusal is honest; only a wrong value is a failure.
                }
            }
        }

        output.WriteLine(tally.Summary());
        tally.HoldsEverywhere(8 * count);
    }

    private void Absorption(int count, int seed)
    {
        var tally = new BoundTally();
        foreach (var (chain, random) in Chains(count, seed, ChainMaker.Shapes, Small, 1))
        {
            // The states that count: all that can leave for a closed class, or those that can reach a target drawn at random.
            var reference = chain.Reference;
            var reach = reference.Reachable();
            var end = reference.ClosedClasses().SelectMany(c => c).ToHashSet();
            if (end.Count == chain.Count)
            {
                end = [random.Next(chain.Count)];
            }

            var alive = Enumerable.Range(0, chain.Count)
                .Select(i => !end.Contains(i) && Enumerable.Range(0, chain.Count).All(j => !reach[i, j] || end.Any(e => reach[j, e]))).ToArray();
            if (!alive.Any(a => a))
            {
                continue;
            }

            var problem = new AbsorptionProblem { Generator = chain.Generator(), Alive = alive, Starts = [chain.Start], Rewards = [chain.Rewards] };
            var outside = Enumerable.Range(0, chain.Count).Where(i => !alive[i]).ToArray();
            foreach (var solver in SolverCatalog.Absorption.Where(s => double.IsFinite(s.Cost(problem))))
            {
                AbsorptionResult result;
                try
                {
                    result = solver.Solve(problem, SolveContext.Default);
                }
                catch (NotConvergedException)
                {
                    continue;
                }

                for (var i = 0; i < chain.Count; i++)
                {
                    var earned = alive[i] ? reference.TotalUntil(ChainProblems.Unit(chain.Count, i), outside, chain.Rewards) : BigFloat.Zero;
                    var value = result.Earnings[0][i];
                    tally.Add($"{solver.Name} earnings", chain, $"earnings[{i}]", value, value * result.RelativeBound, earned);
                    var spent = alive[i] ? reference.TotalUntil(chain.Start, outside, ChainProblems.Unit(chain.Count, i)) : BigFloat.Zero;
                    value = result.Sojourns[0][i];
                    tally.Add($"{solver.Name} sojourns", chain, $"sojourns[{i}]", value, value * result.RelativeBound, spent);
                }
            }
        }

        output.WriteLine(tally.Summary());
        tally.HoldsEverywhere(8 * count);
    }
}
