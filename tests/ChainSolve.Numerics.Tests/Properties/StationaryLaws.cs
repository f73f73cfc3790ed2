using ChainSolve.Numerics.Iteration;
using ChainSolve.Numerics.Stationary;
using ChainSolve.Numerics.Tests.Checks;
using ChainSolve.Tests.Shared.Chains;

namespace ChainSolve.Numerics.Tests.Properties;

/// <summary>What holds for the stationary vector of every irreducible chain.</summary>
internal static class StationaryLaws
{
    public static void MethodsAgree(RandomChain chain)
    {
        var results = Solve(chain);
        Assert.True(results.Count >= 2, "At least the two eliminations must answer.");
        foreach (var (name, result) in results.Skip(1))
        {
            Near(results[0].Result, result, $"{results[0].Name} and {name}");
        }
    }

    public static void RenumberingRenumbers(RandomChain chain)
    {
        var n = chain.Count;
        var turned = chain with { Moves = [.. chain.Moves.Select(m => (n - 1 - m.From, n - 1 - m.To, m.Rate))] };
        foreach (var ((name, one), (_, two)) in Pairs(Solve(chain), Solve(turned)))
        {
            Near(one, two with { Probabilities = [.. two.Probabilities.Reverse()] }, name);
        }
    }

    /// <summary>A power of two changes no bit, another factor only what rounding the rates can change: 2n units, entry by entry (O'Cinneide 1993).</summary>
    public static void ScaledTimeChangesNothing(RandomChain chain)
    {
        var doubled = chain with { Moves = [.. chain.Moves.Select(m => (m.From, m.To, m.Rate * 1024))] };
        foreach (var ((name, one), (_, two)) in Pairs(Solve(chain), Solve(doubled)))
        {
            Assert.True(one.Probabilities.SequenceEqual(two.Probabilities), name);
        }

        var odd = chain with { Moves = [.. chain.Moves.Select(m => (m.From, m.To, m.Rate * 3.7))] };
        foreach (var ((name, one), (_, two)) in Pairs(Solve(chain), Solve(odd)))
        {
            Near(one, two with { RelativeBound = two.RelativeBound + (chain.Count * 5e-16) }, name);
        }
    }

    /// <summary>What flows out of a state flows in, and all adds to one.</summary>
    public static void FlowsBalance(RandomChain chain)
    {
        foreach (var (name, result) in Solve(chain))
        {
            var net = new double[chain.Count];
            var gross = new double[chain.Count];
            foreach (var (from, to, rate) in chain.Moves)
            {
                var flow = result.Probabilities[from] * rate;
                net[from] -= flow;
                net[to] += flow;
                gross[from] += flow;
                gross[to] += flow;
            }

            Assert.All(
                Enumerable.Range(0, chain.Count),
                i => Assert.True(Math.Abs(net[i]) <= gross[i] * (result.RelativeBound + (4e-16 * chain.Count)), $"{name}: state {i} {net[i]:G3}"));
            Assert.True(Math.Abs(result.Probabilities.Sum() - 1) <= result.RelativeBound + (4e-16 * chain.Count), name);
        }
    }

    private static List<(string Name, StationaryVector Result)> Solve(RandomChain chain)
    {
        var results = new List<(string, StationaryVector)>();
        foreach (var solver in SolverCatalog.Stationary.Where(s => double.IsFinite(s.Cost(chain.Generator()))))
        {
            try
            {
                results.Add((solver.Name, solver.Solve(chain.Generator(), SolveContext.Default)));
            }
            catch (NotConvergedException)
            {
                // A sweep that gives up on a nearly decomposable chain says so; that is no wrong answer.
            }
        }

        return results;
    }

    private static IEnumerable<((string Name, StationaryVector Result) One, (string Name, StationaryVector Result) Two)> Pairs(
        List<(string Name, StationaryVector Result)> one, List<(string Name, StationaryVector Result)> two) =>
        one.Join(two, a => a.Name, b => b.Name, (a, b) => (a, b));

    private static void Near(StationaryVector one, StationaryVector two, string what)
    {
        for (var i = 0; i < one.Probabilities.Length; i++)
        {
            var slack = (one.Probabilities[i] * one.RelativeBound) + (two.Probabilities[i] * two.RelativeBound);
            Assert.True(
                Math.Abs(one.Probabilities[i] - two.Probabilities[i]) <= slack,
                $"{what}: state {i}: {one.Probabilities[i]:R} ± {one.RelativeBound:G3} relative and {two.Probabilities[i]:R} ± {two.RelativeBound:G3}");
        }
    }
}
