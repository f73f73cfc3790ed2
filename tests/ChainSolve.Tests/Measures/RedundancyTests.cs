using ChainSolve.Language.Syntax;
using static ChainSolve.Tests.Measures.HandMeasures;
using static ChainSolve.Tests.Measures.TwoStateTests;

namespace ChainSolve.Tests.Measures;

/// <summary>
/// Pairs and triples with repair against closed forms (Trivedi 2002; Rausand and Hoyland 2004; quoted from memory, and each
/// follows from the balance of a few states), at rates where ordinary elimination has no digits left.
/// </summary>
public class RedundancyTests
{
    private const double M = 1;

    [Theory]
    [InlineData(1e-3)]
    [InlineData(1e-9)]
    public void Pair_OneCrew_ClosedForms(double l)
    {
        var pair = new HandChain("both one none", null, (0, 1, 2 * l), (1, 0, M), (1, 2, l), (2, 1, M));
        var (failed, working) = (pair.In("none"), pair.In("both", "one"));
        Holds(((3 * l) + M) / (2 * l * l), pair.Solve(TimeTo(MeasureKind.MeanTime, failed)));

        var (s1, s2) = Decays(l);
        Holds(Math.Sqrt((1 / s1 / s1) + (1 / s2 / s2)), pair.Solve(TimeTo(MeasureKind.DeviationTime, failed)));

        var balance = (M * M) + (2 * M * l) + (2 * l * l);
        Holds(2 * l * l / balance, pair.Solve(Steady(MeasureKind.Probability, failed)));
        Holds(2 * l * l * M / balance, pair.Solve(Steady(MeasureKind.Entries, failed)));
        Holds(1 / M, pair.Solve(Steady(MeasureKind.MeanSpell, failed)));
        Holds(((M * M) + (2 * M * l)) / (2 * l * l * M), pair.Solve(Steady(MeasureKind.MeanSpell, working)));

        // Expected repairs before the failure are m / l; they are earned at rate m in the state with one failed.
        Holds(M / l, pair.Solve(TotalUntil(pair.Earns(0, M, 0), failed)));
        Holds((l + M) / (2 * l * l), pair.Solve(TotalUntil(pair.Earns(1, 0, 0), failed)));
        Holds(1 / l, pair.Solve(TotalUntil(pair.Earns(0, 1, 0), failed)));
    }

    [Theory]
    [InlineData(1e-3, 3)]
    [InlineData(1e-9, 1e12)]
    public void Pair_Unreliability_ComputedDirectly(double l, double t)
    {
        var pair = new HandChain("both one none", null, (0, 1, 2 * l), (1, 0, M), (1, 2, l), (2, 1, M));
        var (s1, s2) = Decays(l);

        // F = 1 - (s1 e^-s2 t - s2 e^-s1 t) / (s1 - s2), written with functions that keep small differences.
        var expected = ((s1 * Rise(s2 * t)) - (s2 * Rise(s1 * t))) / (s1 - s2);
        Holds(expected, pair.Solve(Over(MeasureKind.Onset, pair.In("none"), t)), 1e-9);
    }

    [Fact]
    public void Onset_ManyOrdersBelowOne_KeepsItsDigits()
    {
        // Three in a row without repair, each with rate 1e-9, over one unit of time: (1 - e^-x)^3 = x^3 (1 - x/2 ...)^3.
        var l = 1e-9;
        var chain = new HandChain("three two one none", null, (0, 1, 3 * l), (1, 2, 2 * l), (2, 3, l));
        Holds(1e-27 * (1 - (1.5 * l)), chain.Solve(Over(MeasureKind.Onset, chain.In("none"), 1)));
    }

    [Fact]
    public void Triple_OneCrew_MeanTime()
    {
        var l = 1e-6;
        var triple = new HandChain("three two one none", null, (0, 1, 3 * l), (1, 0, M), (1, 2, 2 * l), (2, 1, M), (2, 3, l), (3, 2, M));
        var truth = ((11 * l * l) + (4 * l * M) + (M * M)) / (6 * l * l * l);
        Holds(truth, triple.Solve(TimeTo(MeasureKind.MeanTime, triple.In("none"))));
    }

    [Fact]
    public void TotalUntil_OccurrencesThatEndIt_Count()
    {
        // Failures occur at 2 l with both up and at l with one up, and the last of them ends the time: repairs m / l, failures two more.
        var l = 0.125;
        var pair = new HandChain("both one none", null, (0, 1, 2 * l), (1, 0, M), (1, 2, l));
        Holds((M / l) + 2, pair.Solve(TotalUntil(pair.Earns(2 * l, l, 0), pair.In("none"))));
    }

    private static (double S1, double S2) Decays(double l)
    {
        var sum = (3 * l) + M;
        var s1 = (sum + Math.Sqrt((sum * sum) - (8 * l * l))) / 2;
        return (s1, 2 * l * l / s1);
    }

    private static double Rise(double x) => x < 1e-4 ? x - (x * x / 2) + (x * x * x / 6) : 1 - Math.Exp(-x);
}
