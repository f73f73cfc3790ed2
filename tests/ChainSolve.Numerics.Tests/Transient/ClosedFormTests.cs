using ChainSolve.Numerics.Estimates;
using ChainSolve.Numerics.Iteration;
using ChainSolve.Numerics.Tests.Support;
using ChainSolve.Numerics.Transient;
using ChainSolve.Tests.Shared.Reference;
using static ChainSolve.Numerics.Tests.Transient.ClosedForms;

namespace ChainSolve.Numerics.Tests.Transient;

/// <summary>
/// Chains with a closed form. The forms are those of textbooks (Barlow and Proschan 1965 for the unit, Morse 1958 for the queue,
/// Feller 1968 for births and urns, from memory), evaluated in 256 bits from the same doubles, unless said.
/// </summary>
public class ClosedFormTests
{
    public static TheoryData<double, double, double> Units
    {
        get
        {
            var data = new TheoryData<double, double, double>();
            foreach (var failure in new[] { 1e-12, 1e-6, 0.02, 1, 300 })
            {
                foreach (var time in new[] { 1e-12, 1e-3, 0.7, 40, 1e5, 1e13, 1e30 })
                {
                    data.Add(failure, 1, time);
                    data.Add(failure, 1e-9, time);
                }
            }

            return data;
        }
    }

    [Theory]
    [MemberData(nameof(Units))]
    public void Unit_AnyRatesAndTimes_HasAvailabilityAndDowntime(double failure, double repair, double time)
    {
        var chain = Chains.Of(2, (0, 1, failure), (1, 0, repair));
        var sum = (BigFloat)failure + repair;
        var rise = Rise(sum * time);
        var down = failure / sum * rise;
        var up = (repair + (failure * (BigFloat.One - rise))) / sum;

        // t - (1 - e^-st)/s loses digits where st is small; 256 bits leave enough.
        var downtime = failure / sum * (time - (rise / sum));
        var problem = new TransientProblem
        {
            Generator = chain,
            Start = [1, 0],
            Times = [time],
            Rates = [[1, 0], [0, 1]],
            Totals = [[0, 1], [1, 0]],
            WantsDistributions = true,
        };
        foreach (var (result, relative) in Solve(problem))
        {
            Holds(result.Rates[0][0], up, relative);
            Holds(result.Rates[0][1], down, relative);
            Holds(result.Totals[0][0], downtime, relative);
            Holds(result.Totals[0][1], time - downtime, relative);
            Assert.InRange(Chains.Distance(result.Distributions![0][1], down), 0, relative);
        }
    }

    [Theory]
    [InlineData(0.1)]
    [InlineData(1.5)]
    [InlineData(5)]
    [InlineData(100)]
    public void Stages_InARow_EndLikeAPoissonProcess(double time)
    {
        var chain = Chains.Of(21, [.. Enumerable.Range(0, 20).Select(i => (i, i + 1, 4.0))]);
        var end = new double[21];
        end[20] = 1;
        var alive = end.Select(e => e == 0).ToArray();
        var start = Chains.StartAt(21, 0);
        foreach (var (result, relative) in Solve(new TransientProblem { Generator = chain, Start = start, Times = [time], Rates = [end] }))
        {
            Holds(result.Rates[0][0], PoissonFrom(4 * (BigFloat)time, 20), relative);
        }

        var survive = Enumerable.Repeat(1.0, 21).ToArray();
        foreach (var (result, relative) in Solve(new TransientProblem { Generator = chain, Start = start, Times = [time], Rates = [survive], Alive = alive }))
        {
            var mean = 4 * (BigFloat)time;
            var survival = Enumerable.Range(0, 20).Aggregate(BigFloat.Zero, (s, k) => s + (Power(mean, k) / Factorial(k)));
            Holds(result.Rates[0][0], survival * Decay(mean), relative);
        }
    }

    [Fact]
    public void Births_OfYule_AreGeometric()
    {
        const double Rate = 0.5;
        const double Time = 2;
        const int Count = 200;
        var chain = Chains.Of(Count, [.. Enumerable.Range(1, Count - 1).Select(i => (i - 1, i, Rate * i))]);
        var problem = new TransientProblem { Generator = chain, Start = Chains.StartAt(Count, 0), Times = [Time], WantsDistributions = true };
        foreach (var (result, relative) in Solve(problem))
        {
            for (var n = 1; n < Count; n++)
            {
                var truth = Decay((BigFloat)Rate * Time) * Power(Rise((BigFloat)Rate * Time), n - 1);
                Assert.InRange(Chains.Distance(result.Distributions![0][n - 1], truth), 0, relative);
                Assert.InRange(result.DistributionBounds![0][n - 1] / result.Distributions[0][n - 1], 0, relative);
            }
        }
    }

    [Theory]
    [InlineData(0.001)]
    [InlineData(0.3)]
    [InlineData(20)]
    public void Urns_OfEhrenfest_AreBinomial(double time)
    {
        const int Balls = 40;
        var chain = Chains.BirthDeath([.. Enumerable.Range(0, Balls).Select(i => (double)(Balls - i))], [.. Enumerable.Range(1, Balls).Select(i => (double)i)]);
        var moved = Rise(2 * (BigFloat)time).TimesPowerOfTwo(-1);
        var problem = new TransientProblem { Generator = chain, Start = Chains.StartAt(Balls + 1, 0), Times = [time], WantsDistributions = true };
        foreach (var (result, relative) in Solve(problem))
        {
            for (var k = 0; k <= Balls; k++)
            {
                var truth = Binomial(Balls, k) * Power(moved, k) * Power(BigFloat.One - moved, Balls - k);
                Assert.InRange(Chains.Distance(result.Distributions![0][k], truth), 0, relative);
            }
        }
    }

    [Theory]
    [InlineData(0.5)]
    [InlineData(5)]
    [InlineData(50)]
    public void Queue_WithTenPlaces_HasTheSpectralForm(double time)
    {
        // In plain doubles: sums of cosines that lose a few digits; so the tolerance is that of the form.
        const int Places = 10;
        const double Arrival = 0.8;
        var chain = Chains.BirthDeath([.. Enumerable.Repeat(Arrival, Places)], [.. Enumerable.Repeat(1.0, Places)]);
        var problem = new TransientProblem { Generator = chain, Start = Chains.StartAt(Places + 1, 0), Times = [time], WantsDistributions = true };
        foreach (var (result, _) in Solve(problem))
        {
            for (var n = 0; n <= Places; n++)
            {
                var value = (1 - Arrival) * Math.Pow(Arrival, n) / (1 - Math.Pow(Arrival, Places + 1));
                for (var s = 1; s <= Places; s++)
                {
                    var angle = s * Math.PI / (Places + 1);
                    var root = Math.Sqrt(Arrival);
                    double Wave(int i) => Math.Sin(i * angle) - (root * Math.Sin((i + 1) * angle));
                    value += 2 * Math.Pow(root, n) / (Places + 1) * Wave(0) * Wave(n) / (1 + Arrival - (2 * root * Math.Cos(angle)))
                        * Math.Exp((-(1 + Arrival) * time) + (2 * time * root * Math.Cos(angle)));
                }

                Assert.Equal(value, result.Distributions![0][n], 1e-14);
            }
        }
    }

    /// <summary>All methods that can, each with the relative error that is allowed.</summary>
    internal static IEnumerable<(TransientResult Result, double Relative)> Solve(TransientProblem problem)
    {
        yield return (new SquaringSolver().Solve(problem, SolveContext.Default), 1.2e-16);
        if (new UniformizationSolver().Cost(problem) < 1e7)
        {
            yield return (new UniformizationSolver().Solve(problem, SolveContext.Default), 1.3e-15);
        }
    }

    private static BigFloat Factorial(int k) => Enumerable.Range(1, k).Aggregate(BigFloat.One, (f, i) => f * i);

    private static void Holds(Estimate estimate, BigFloat truth, double relative)
    {
        Assert.True(estimate.IsProved);
        Assert.InRange(Chains.Distance(estimate.Value, truth), 0, relative);
        Assert.True((estimate.Value - truth).Abs <= estimate.Bound + (truth * 1e-60), $"{estimate} and {truth}");
        Assert.InRange(estimate.Bound, 0, estimate.Value * relative);
    }
}
