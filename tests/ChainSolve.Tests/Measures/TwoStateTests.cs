using ChainSolve.Language.Syntax;
using ChainSolve.Numerics.Estimates;
using static ChainSolve.Tests.Measures.HandMeasures;

namespace ChainSolve.Tests.Measures;

/// <summary>
/// Every kind of measure on the unit that fails at l and is restored at m, with s = l + m. The closed forms are those of IEC 61703
/// and of Barlow and Proschan (1965), both quoted from memory; each can be integrated by hand.
/// </summary>
public class TwoStateTests
{
    private const double L = 0.25;
    private const double M = 1.75;
    private const double S = L + M;

    private static double Gone(double t) => -Math.Exp(-S * t) + 1;

    private static HandChain Unit(double[]? start = null) => new("up down", start, (0, 1, L), (1, 0, M));

    [Theory]
    [InlineData(0.5)]
    [InlineData(4)]
    [InlineData(400)]
    public void Curves_AtATime_ClosedForms(double t)
    {
        var unit = Unit();
        var (up, down) = (unit.In("up"), unit.In("down"));
        Holds(M / S + (L / S * Math.Exp(-S * t)), unit.Solve(At(MeasureKind.Probability, up, t)));
        Holds(L / S * Gone(t), unit.Solve(At(MeasureKind.Probability, down, t)));
        var uptime = (M / S * t) + (L / (S * S) * Gone(t));
        Holds(uptime / t, unit.Solve(Over(MeasureKind.Average, up, t)));
        Holds(Math.Exp(-L * t), unit.Solve(Over(MeasureKind.Reliability, up, t)), 1e-10);
        Holds(1 - Math.Exp(-L * t), unit.Solve(Over(MeasureKind.Onset, down, t)));
        Holds(L * ((M / S) + (L / S * Math.Exp(-S * t))), unit.Solve(At(MeasureKind.Entries, down, t)));
        Holds(L * uptime, unit.Solve(Over(MeasureKind.Entries, down, t)));
        Holds(100 - (103 * L / S * Gone(t)), unit.Solve(At(MeasureKind.Expected, unit.Earns(100, -3), t)));
        Holds((100 * uptime) - (3 * (t - uptime)), unit.Solve(Over(MeasureKind.Total, unit.Earns(100, -3), t)));
        Holds(100 - (103 * (t - uptime) / t), unit.Solve(Over(MeasureKind.Average, unit.Earns(100, -3), t)));
    }

    [Fact]
    public void Steady_EveryKind_ClosedForms()
    {
        var unit = Unit();
        var (up, down) = (unit.In("up"), unit.In("down"));
        Holds(M / S, unit.Solve(Steady(MeasureKind.Probability, up)));
        Holds(L / S, unit.Solve(Steady(MeasureKind.Average, down)));
        Holds(((5 * M) - (7 * L)) / S, unit.Solve(Steady(MeasureKind.Expected, unit.Earns(5, -7))));
        Holds(((5 * M) - (7 * L)) / S, unit.Solve(Steady(MeasureKind.Average, unit.Earns(5, -7))));
        Holds(L * M / S, unit.Solve(Steady(MeasureKind.Entries, down)));
        Holds(1 / L, unit.Solve(Steady(MeasureKind.MeanSpell, up)));
        Holds(1 / M, unit.Solve(Steady(MeasureKind.MeanSpell, down)));
    }

    [Fact]
    public void Times_ToTheFirstFailure_Exponential()
    {
        var unit = Unit();
        var down = unit.In("down");
        Holds(4, unit.Solve(TimeTo(MeasureKind.MeanTime, down)));
        Holds(4, unit.Solve(TimeTo(MeasureKind.DeviationTime, down)));
        Holds(4 * Math.Log(2), unit.Solve(TimeTo(MeasureKind.QuantileTime, down, 0.5)));
        Holds(8, unit.Solve(TotalUntil(unit.Earns(2, 50), down)));
        Holds(-8, unit.Solve(TotalUntil(unit.Earns(-2, 50), down)));
    }

    [Fact]
    public void Curves_AtTimeZero_AsTheNotationSays()
    {
        var unit = Unit([0.25, 0.75]);
        var down = unit.In("down");
        Holds(0.75, unit.Solve(At(MeasureKind.Probability, down, 0)));
        Holds(0.75, unit.Solve(Over(MeasureKind.Average, down, 0)));
        Holds(1.5, unit.Solve(Over(MeasureKind.Average, unit.Earns(3, 1), 0)));
        Holds(0.25, unit.Solve(Over(MeasureKind.Reliability, unit.In("up"), 0)));
        Holds(0.75, unit.Solve(Over(MeasureKind.Onset, down, 0)));
        Zero(unit.Solve(Over(MeasureKind.Total, unit.Earns(3, 1), 0)));
        Zero(unit.Solve(Over(MeasureKind.Entries, down, 0)));
    }

    [Fact]
    public void Times_StartPartlyInside_CountAsZero()
    {
        var unit = Unit([0.25, 0.75]);
        var down = unit.In("down");
        Holds(1, unit.Solve(TimeTo(MeasureKind.MeanTime, down)));

        // Second moment 0.25 * 2 / l^2 = 8, less the square of the mean.
        Holds(Math.Sqrt(7), unit.Solve(TimeTo(MeasureKind.DeviationTime, down)));
        Zero(unit.Solve(TimeTo(MeasureKind.QuantileTime, down, 0.75)));
        Holds(-Math.Log(0.8) / L, unit.Solve(TimeTo(MeasureKind.QuantileTime, down, 0.8)));
        Holds(0.5, unit.Solve(TotalUntil(unit.Earns(0.5, 9), down)));
    }

    [Fact]
    public void Times_StartInside_Zero()
    {
        var unit = Unit([0, 1]);
        var down = unit.In("down");
        Zero(unit.Solve(TimeTo(MeasureKind.MeanTime, down)));
        Zero(unit.Solve(TimeTo(MeasureKind.DeviationTime, down)));
        Zero(unit.Solve(TimeTo(MeasureKind.QuantileTime, down, 0.9)));
        Zero(unit.Solve(TotalUntil(unit.Earns(1, 1), down)));
        Holds(1, unit.Solve(Over(MeasureKind.Onset, down, 5)));
        Zero(unit.Solve(Over(MeasureKind.Reliability, unit.In("up"), 5)));
    }

    [Fact]
    public void Points_OfUnsortedTimes_KeepTheirOrder()
    {
        var unit = Unit();
        var result = unit.Solve(At(MeasureKind.Probability, unit.In("down"), 4, 0, 0.5, 4));
        Assert.Equal([4, 0, 0.5, 4], result.Points.Select(p => p.Time!.Value));
        Assert.Equal(result.Points[0], result.Points[3]);
        Assert.Equal(0, result.Points[1].Value);
        Assert.Equal(0, result.Points[1].ErrorBound);
    }

    internal static void Holds(double truth, MeasureResult result, double room = 4e-15)
    {
        var point = Assert.Single(result.Points);
        Assert.Equal(SolveStatus.Ok, result.Status);
        Assert.True(point.IsProved);
        var error = Math.Abs(point.Value - truth);
        Assert.True(error <= point.ErrorBound + (Math.Abs(truth) * room), $"{point.Value:R} against {truth:R}, bound {point.ErrorBound:G3}");
        Assert.True(point.ErrorBound <= Math.Abs(truth) * 1e-10, $"The bound {point.ErrorBound:G3} is wide for {truth:R}.");
    }

    internal static void Zero(MeasureResult result)
    {
        var point = Assert.Single(result.Points);
        Assert.Equal(0, point.Value);
        Assert.Equal(0, point.ErrorBound);
    }
}
