using ChainSolve.Numerics.Iteration;
using ChainSolve.Numerics.Operators;
using ChainSolve.Numerics.Tests.Support;
using ChainSolve.Numerics.Transient;
using ChainSolve.Tests.Shared.Reference;

namespace ChainSolve.Numerics.Tests.Transient;

/// <summary>Walks that end long before the last time, against closed forms and against squaring, which proves its bounds another way.</summary>
public class SettlingTests
{
    private static readonly double[] AllTimes = [0, 1, 30, 1e3, 1e5, 1e7, 1e10, 1e13];

    [Fact]
    public void Walk_UnitWithRatesTwelvePowersApart_TakesAFewSteps()
    {
        var problem = Problem(Chains.Of(2, (0, 1, 1e-12), (1, 0, 1)), [0, 1], 1e13);
        var result = new UniformizationSolver().Solve(problem, SolveContext.Default);

        // Closed form of the two-state unit.
        var (sum, time) = ((BigFloat)1e-12 + 1, (BigFloat)1e13);
        var down = (BigFloat)1e-12 / sum * ClosedForms.Rise(sum * time);
        var total = (BigFloat)1e-12 / sum * (time - (ClosedForms.Rise(sum * time) / sum));
        Assert.InRange(Chains.Distance(result.Rates[0][0].Value, down), 0, 5e-16);
        Assert.InRange(Chains.Distance(result.Totals[0][0].Value, total), 0, 5e-16);
        Assert.InRange(Steps(result), 1, 100);
        Assert.EndsWith("settled", result.How, StringComparison.Ordinal);
    }

    [Fact]
    public void Walk_LeakOfOneInTenBillion_EndsAtItsHazard()
    {
        // Exponential with the rate of the leak.
        var problem = Problem(Chains.Of(3, (0, 1, 1), (1, 0, 3), (0, 2, 1e-10), (1, 2, 1e-10)), [1, 1, 0], 1e10) with { Alive = [true, true, false] };
        var result = new UniformizationSolver().Solve(problem, SolveContext.Default);

        Assert.InRange(Chains.Distance(result.Rates[0][0].Value, ClosedForms.Decay((BigFloat)1e-10 * 1e10)), 0, 1e-15);
        Assert.InRange(Chains.Distance(result.Totals[0][0].Value, ClosedForms.Rise((BigFloat)1e-10 * 1e10) / 1e-10), 0, 1e-15);
        Assert.InRange(Steps(result), 1, 200);
    }

    /// <summary>Invented chains of many structures; each with the most steps that it may take.</summary>
    public static TheoryData<string, int> Structures => new()
    {
        { "hidden spare", 500 },
        { "two hidden sensors", 3000 },
        { "start-up", 15_000 },
        { "two ends", 1000 },
        { "stages of ageing", 5000 },
        { "equal stages", 20_000 },
        { "slow below slow", 3000 },
        { "masked", 500 },
    };

    [Theory]
    [MemberData(nameof(Structures))]
    public void Walk_ChainThatSettles_AgreesWithSquaring(string name, int mostSteps)
    {
        var (chain, alive) = Make(name);
        var problem = Problem(chain, [.. Enumerable.Range(0, chain.StateCount).Select(i => i % 3 == 2 ? 0 : i + 1.0)], AllTimes) with
        {
            Alive = alive,
            WantsDistributions = name != "start-up",
        };
        var result = new UniformizationSolver().Solve(problem, SolveContext.Default);
        Agrees(problem, result);
        Assert.InRange(Steps(result), 1, mostSteps);
    }

    [Fact]
    public void Walk_ChainThatNearlyFallsApart_DoesNotStopEarly()
    {
        // For thousands of steps next to nothing changes; only then do the two halves come to their balance.
        var chain = Chains.Of(4, (0, 1, 1), (1, 0, 2), (2, 3, 1), (3, 2, 0.5), (1, 2, 1e-4), (2, 1, 2e-4));
        var problem = Problem(chain, [0, 0, 0, 1], 1, 1e2, 1e3, 1e4, 1e6);
        var result = new UniformizationSolver().Solve(problem, SolveContext.Default);
        Agrees(problem, result);
        Assert.InRange(Steps(result), 100_000, 3_000_000);
    }

    [Fact]
    public void Walk_SlowLeakUnderARewardThatSeesNothingElse_DoesNotStopEarly()
    {
        var chain = Chains.Of(5, (0, 1, 0.5), (1, 0, 1), (1, 2, 1e-9), (2, 3, 1e-3), (3, 2, 1), (3, 4, 1e-7));
        var problem = Problem(chain, [0, 0, 0, 0, 1], 1, 1e3, 1e6, 1e9, 1e12);
        Agrees(problem, new UniformizationSolver().Solve(problem, SolveContext.Default));
    }

    [Fact]
    public void Walk_WithoutPatience_SaysHowFarItCame()
    {
        var chain = Chains.Of(4, (0, 1, 1), (1, 0, 2), (2, 3, 1), (3, 2, 0.5), (1, 2, 1e-9), (2, 1, 2e-9));
        var failure = Assert.Throws<NotConvergedException>(
            () => new UniformizationSolver { MostWork = 1e6 }.Solve(Problem(chain, [0, 0, 0, 1], 1e12), SolveContext.Default));
        Assert.Matches("^after [0-9]+ steps of uniformization the chain has not settled; about [0-9e+.]+ more would be needed$", failure.Message);
    }

    [Fact]
    public void Select_ChainTooLargeToSquareSoon_WalksFirst()
    {
        // 900 states: squaring takes minutes, the walk settles at once.
        var chain = Chains.Lattice([30, 30], (_, l) => 1e-3 * (29 - l), (_, l) => 0.5 * l);
        var problem = Problem(chain, Chains.StartAt(900, 31), 1e8);
        var (result, choice) = TransientSolvers.Solve(problem);

        Assert.Equal("uniformization", choice.Solver.Name);
        Assert.Equal("squaring", TransientSolvers.Rank(problem, null, null)[1].Solver.Name);
        Assert.InRange(Steps(result), 1, 10_000);

        // Independent items, settled: P(one of 29 down) on either axis, each down with probability 1/501.
        var down = BigFloat.One / (BigFloat)501;
        var one = ClosedForms.Binomial(29, 1) * down * ClosedForms.Power(BigFloat.One - down, 28);
        Assert.InRange(Chains.Distance(result.Rates[0][0].Value, one * one), 0, 5e-15);
    }

    private static (Generator Chain, bool[]? Alive) Make(string name)
    {
        switch (name)
        {
            case "hidden spare":
                return (WithSensors(1), null);
            case "two hidden sensors":
                return (WithSensors(2), null);
            case "start-up":
                return (Chains.Of(5, (0, 1, 0.4), (1, 2, 0.02), (2, 3, 1e-4), (3, 2, 0.7), (2, 4, 1e-9), (4, 2, 2)), null);
            case "two ends":
                return (Chains.Of(5, (0, 1, 1e-3), (1, 0, 1), (1, 2, 1e-7), (0, 3, 1e-9), (3, 4, 1), (4, 3, 2)), null);
            case "stages of ageing":
                return (Chains.Of(6, (0, 1, 0.1), (1, 0, 0.9), (0, 2, 1e-5), (2, 3, 0.2), (3, 2, 0.9), (3, 4, 3e-5), (4, 5, 1e-7)), null);
            case "equal stages":
                return (Chains.Of(5, (0, 1, 2e-6), (1, 2, 2e-6), (2, 3, 2e-6), (3, 4, 1), (4, 3, 1)), null);
            case "slow below slow":
                return (Chains.Of(6, (0, 1, 1), (1, 0, 1), (1, 2, 1e-8), (2, 3, 1), (3, 2, 1), (3, 4, 1e-11), (4, 5, 1), (5, 4, 2)), null);
            default:
                return (WithSensors(1), [true, true, true, true, true, true, true, false]);
        }
    }

    /// <summary>Two pumps that are repaired, and sensors whose failures nobody sees.</summary>
    private static Generator WithSensors(int sensors)
    {
        var builder = new GeneratorBuilder(4 << sensors);
        for (var state = 0; state < 4 << sensors; state++)
        {
            builder.Add(state, state ^ 1, (state & 1) == 0 ? 1e-3 : 0.2).Add(state, state ^ 2, (state & 2) == 0 ? 2e-3 : 0.15);
            for (var s = 0; s < sensors; s++)
            {
                if ((state & (4 << s)) == 0)
                {
                    builder.Add(state, state | (4 << s), 1e-6 * (1 + s + (state & 1)));
                }
            }
        }

        return builder.Build();
    }

    private static TransientProblem Problem(Generator chain, double[] reward, params double[] times) => new()
    {
        Generator = chain,
        Start = Chains.StartAt(chain.StateCount, 0),
        Times = times,
        Rates = [reward],
        Totals = [reward],
    };

    private static void Agrees(TransientProblem problem, TransientResult result)
    {
        var exact = new SquaringSolver().Solve(problem, SolveContext.Default);
        for (var t = 0; t < problem.Times.Count; t++)
        {
            foreach (var (found, right) in new[] { (result.Rates[t][0], exact.Rates[t][0]), (result.Totals[t][0], exact.Totals[t][0]) })
            {
                Assert.InRange(Math.Abs(found.Value - right.Value), 0, found.Bound + right.Bound);
                Assert.InRange(found.Bound, 0, Math.Max(found.Value * 1e-13, 1e-290));
            }

            for (var i = 0; problem.WantsDistributions && i < problem.Start.Length; i++)
            {
                var (found, bound) = (result.Distributions![t][i], result.DistributionBounds![t][i]);
                Assert.InRange(Math.Abs(found - exact.Distributions![t][i]), 0, bound + exact.DistributionBounds![t][i]);
                Assert.InRange(bound, 0, Math.Max(found * 1e-13, 1e-290));
            }
        }
    }

    private static long Steps(TransientResult result) =>
        long.Parse(result.How.Split(", ").Single(p => p.EndsWith(" steps", StringComparison.Ordinal)).Split(' ')[0], System.Globalization.CultureInfo.InvariantCulture);
}
