using System.Globalization;
using ChainSolve.Tests.Shared.Reference;

namespace ChainSolve.Tests.Shared.Checks;

/// <summary>Holds a result to the digits of a case: to its tolerance, and to the bound that came with the result.</summary>
internal static class CheckVerdict
{
    /// <summary>How far the rounding of the rates to doubles moves an answer, relative.</summary>
    private const double InputRounding = 1.1e-15;

    /// <summary>The same for the loss of a group of lines, which moves up to 17 times as much as the traffic that is given.</summary>
    private const double TrafficRounding = 2.5e-15;

    public static void Holds(CheckCase check, Bounded result)
    {
        var isTraffic = check.Ask.What == "offered-traffic";
        var expected = BigFloat.Parse(isTraffic ? check.Ask.Loss!.Value.ToString("R", CultureInfo.InvariantCulture) : check.Expected);
        Assert.True(double.IsFinite(result.Value), $"The value is {result.Value}.");
        var error = (result.Value - expected).Abs;
        var scale = expected.Abs;

        Assert.True(
            error <= scale * check.Tolerance,
            $"{check.Id}: {result.Value:R} is off by {(error / scale).ToDouble():G3} relative, allowed {check.Tolerance:G3}; expected {expected}; source: {check.Source}");
        Assert.True(
            error <= result.Bound + (scale * (isTraffic ? TrafficRounding : InputRounding)),
            $"{check.Id}: {result.Value:R} is off by {error.ToDouble():G3}, the bound is {result.Bound:G3}; expected {expected}");
    }
}
