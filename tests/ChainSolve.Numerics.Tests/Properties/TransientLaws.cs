using ChainSolve.Numerics.Iteration;
using ChainSolve.Numerics.Tests.Checks;
using ChainSolve.Numerics.Transient;
using ChainSolve.Tests.Shared.Chains;
using MathNet.Numerics.Integration;

namespace ChainSolve.Numerics.Tests.Properties;

/// <summary>What holds for the transition function of every chain, each as a check that throws with a reason.</summary>
internal static class TransientLaws
{
    /// <summary>The rounding of what a test itself adds up or hands over, relative.</summary>
    private const double OwnRounding = 4e-16;

    public static IEnumerable<ITransientSolver> SolversFor(TransientProblem problem) =>
        SolverCatalog.Transient.Where(s => s.Cost(problem) < 3e7);

    public static void RowsAddToOne(RandomChain chain)
    {
        for (var start = 0; start < chain.Count; start++)
        {
            var problem = chain.Problem(chain.Time) with { Start = ChainProblems.Unit(chain.Count, start) };
            foreach (var solver in SolversFor(problem))
            {
                var result = solver.Solve(problem, SolveContext.Default);
                Near(1, OwnRounding * chain.Count, result.Distributions![0].Sum(), result.DistributionBounds![0].Sum(), $"{solver.Name}: row {start}");
            }
        }
    }

    public static void AtZeroIsTheStart(RandomChain chain)
    {
        var problem = chain.Problem(0);
        foreach (var solver in SolversFor(problem))
        {
            var result = solver.Solve(problem, SolveContext.Default);
            Assert.Equal(chain.Start, result.Distributions![0]);
            Assert.Equal(0, result.Totals[0][0].Value);
            Assert.Equal(0, result.Totals[0][0].Bound);
        }
    }

    /// <summary>P(s + t) = P(s) P(t): to go on from where half the time has led.</summary>
    public static void StepsCompose(RandomChain chain)
    {
        // Both parts are multiples of a power of two far below them, so that their sum is exact.
        var grain = Math.ScaleB(1, (int)Math.Floor(Math.Log2(chain.Time)) - 40);
        var first = Math.Max(grain, Math.Floor(chain.Time * 0.37 / grain) * grain);
        var second = Math.Floor(chain.Time / grain) * grain;
        var whole = chain.Problem(first + second);
        var everywhere = Enumerable.Repeat(1.0 / chain.Count, chain.Count).ToArray();
        foreach (var solver in SolversFor(whole with { Start = everywhere }))
        {
            var expected = solver.Solve(whole, SolveContext.Default);
            var half = solver.Solve(chain.Problem(first), SolveContext.Default);
            var composed = new double[chain.Count];
            var slack = new double[chain.Count];
            for (var k = 0; k < chain.Count; k++)
            {
                var rest = solver.Solve(chain.Problem(second) with { Start = ChainProblems.Unit(chain.Count, k) }, SolveContext.Default);
                for (var j = 0; j < chain.Count; j++)
                {
                    var (p, dp) = (half.Distributions![0][k], half.DistributionBounds![0][k]);
                    var (q, dq) = (rest.Distributions![0][j], rest.DistributionBounds![0][j]);
                    composed[j] += p * q;
                    slack[j] += (p * dq) + (q * dp) + (dp * dq) + (p * q * OwnRounding * chain.Count);
                }
            }

            for (var j = 0; j < chain.Count; j++)
            {
                Near(expected.Distributions![0][j], expected.DistributionBounds![0][j], composed[j], slack[j] + double.Epsilon, $"{solver.Name}: state {j}");
            }
        }
    }

    /// <summary>The value at a time does not depend on the other times, nor on their order.</summary>
    public static void GridIsOneByOne(RandomChain chain)
    {
        double[] times = [chain.Time, 0, chain.Time / 7, chain.Time / 3, chain.Time / 1000, chain.Time / 7];
        var problem = chain.Problem(times);
        foreach (var solver in SolversFor(problem))
        {
            var all = solver.Solve(problem, SolveContext.Default);
            for (var k = 0; k < times.Length; k++)
            {
                SameWithinBounds(all, k, solver.Solve(chain.Problem(times[k]), SolveContext.Default), 0, $"{solver.Name}: t = {times[k]:R}");
            }
        }
    }

    public static void MethodsAgree(RandomChain chain)
    {
        var problem = chain.Problem(chain.Time, chain.Time / 10);
        var results = SolversFor(problem).Select(s => (s.Name, Result: s.Solve(problem, SolveContext.Default))).ToList();
        foreach (var (name, result) in results.Skip(1))
        {
            SameWithinBounds(results[0].Result, 0, result, 0, $"{results[0].Name} and {name}");
            SameWithinBounds(results[0].Result, 1, result, 1, $"{results[0].Name} and {name}");
        }
    }

    /// <summary>The total is the integral of the mean reward, by a Gauss-Legendre rule of MathNet.Numerics.</summary>
    public static void TotalIsTheIntegral(RandomChain chain)
    {
        var rule = new GaussLegendreRule(0, chain.Time, 64);
        var problem = chain.Problem([.. rule.Abscissas, chain.Time]);
        foreach (var solver in SolversFor(problem))
        {
            var result = solver.Solve(problem, SolveContext.Default);
            var integral = rule.Weights.Select((w, k) => w * result.Rates[k][0].Value).Sum();
            var slack = rule.Weights.Select((w, k) => w * result.Rates[k][0].Bound).Sum() + (1e-13 * integral);
            var total = result.Totals[rule.Order][0];
            Near(total.Value, total.Bound, integral, slack, solver.Name);
        }
    }

    /// <summary>Other numbers for the states are other numbers for the answers.</summary>
    public static void RenumberingRenumbers(RandomChain chain)
    {
        var n = chain.Count;
        var turned = chain with
        {
            Moves = [.. chain.Moves.Select(m => (n - 1 - m.From, n - 1 - m.To, m.Rate))],
            Start = [.. chain.Start.Reverse()],
            Rewards = [.. chain.Rewards.Reverse()],
        };
        var problem = chain.Problem(chain.Time);
        foreach (var solver in SolversFor(problem))
        {
            var result = solver.Solve(problem, SolveContext.Default);
            var other = solver.Solve(turned.Problem(chain.Time), SolveContext.Default);
            other = other with { Distributions = [[.. other.Distributions![0].Reverse()]], DistributionBounds = [[.. other.DistributionBounds![0].Reverse()]] };
            SameWithinBounds(result, 0, other, 0, solver.Name);
        }
    }

    /// <summary>Two states: with the rates exchanged, the other state takes the place.</summary>
    public static void ExchangedRatesExchangeStates(RandomChain chain)
    {
        var (there, back) = (chain.Moves.Count > 0 ? chain.Moves[0].Rate : 1, chain.Moves.Count > 1 ? chain.Moves[1].Rate : 1e-3);
        RandomChain Pair(double a, double b, int start) => chain with
        {
            Count = 2,
            Moves = [(0, 1, a), (1, 0, b)],
            Start = ChainProblems.Unit(2, start),
            Rewards = [1, 0],
        };
        var problem = Pair(there, back, 0).Problem(chain.Time);
        foreach (var solver in SolversFor(problem))
        {
            var one = solver.Solve(problem, SolveContext.Default);
            var two = solver.Solve(Pair(back, there, 1).Problem(chain.Time), SolveContext.Default);
            for (var i = 0; i < 2; i++)
            {
                Near(
                    one.Distributions![0][i], one.DistributionBounds![0][i],
                    two.Distributions![0][1 - i], two.DistributionBounds![0][1 - i], $"{solver.Name}: state {i}");
            }
        }
    }

    /// <summary>Another unit of time changes nothing: not a bit for a power of two, otherwise no more than the rounding of the rates can.</summary>
    public static void ScaledTimeChangesNothing(RandomChain chain)
    {
        foreach (var factor in new[] { 1024.0, 1.0 / 4096, 3.7 })
        {
            var scaled = chain with { Moves = [.. chain.Moves.Select(m => (m.From, m.To, m.Rate * factor))] };
            var problem = chain.Problem(chain.Time);
            foreach (var solver in SolversFor(problem))
            {
                var result = solver.Solve(problem, SolveContext.Default);
                var other = solver.Solve(scaled.Problem(chain.Time / factor), SolveContext.Default);
                if (factor != 3.7)
                {
                    Assert.Equal(result.Distributions![0], other.Distributions![0]);
                    Assert.Equal(result.Rates[0][0].Value, other.Rates[0][0].Value);
                    continue;
                }

                var rounding = 4e-16 * (chain.RateTime + chain.Count + 1);
                for (var i = 0; i < chain.Count; i++)
                {
                    var value = result.Distributions![0][i];
                    var slack = other.DistributionBounds![0][i] + Math.Min(1, rounding * value);
                    Near(value, result.DistributionBounds![0][i], other.Distributions![0][i], slack, $"{solver.Name}: state {i}");
                }
            }
        }
    }

    private static void SameWithinBounds(TransientResult one, int atOne, TransientResult two, int atTwo, string what)
    {
        for (var i = 0; i < one.Distributions![atOne].Length; i++)
        {
            Near(
                one.Distributions[atOne][i], one.DistributionBounds![atOne][i],
                two.Distributions![atTwo][i], two.DistributionBounds![atTwo][i], $"{what}: state {i}");
        }

        Near(one.Rates[atOne][0].Value, one.Rates[atOne][0].Bound, two.Rates[atTwo][0].Value, two.Rates[atTwo][0].Bound, $"{what}: rate");
        Near(one.Totals[atOne][0].Value, one.Totals[atOne][0].Bound, two.Totals[atTwo][0].Value, two.Totals[atTwo][0].Bound, $"{what}: total");
    }

    private static void Near(double one, double oneBound, double two, double twoBound, string what) =>
        Assert.True(
            Math.Abs(one - two) <= oneBound + twoBound,
            $"{what}: {one:R} ± {oneBound:G3} and {two:R} ± {twoBound:G3} are {Math.Abs(one - two):G3} apart");
}
