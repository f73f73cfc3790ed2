using System.Globalization;
using ChainSolve.Tests.Shared.Reference;

namespace ChainSolve.Tests.Shared.Checks;

/// <summary>Holds a result to the digits of a case: to its tolerance, and to the bound that came with the result.</summary>
internal static class CheckVerdict
{
    /// <summary>Fails unless the result has the digits of the case and a true bound.</summary>
    public static void Holds(CheckCase check, Bounded result)
    {
        var expected = Expected(check);
        Assert.True(double.IsFinite(result.Value), $"{check.Id}: the value is {result.Value}.");
        var relative = ((result.Value - expected) / expected).Abs;
        Assert.True(
            relative <= check.Tolerance,
            $"{check.Id}: {result.Value:R} is off by {relative.ToDouble():G3} relative, allowed {check.Tolerance:G3}; expected {expected}; source: {check.Source}");
        IsWithinItsBound(check, result);
    }

    /// <summary>Fails unless the bound of the result is true, whatever the digits.</summary>
    public static void IsWithinItsBound(CheckCase check, Bounded result)
    {
        var expected = Expected(check);
        var error = (result.Value - expected).Abs;
        Assert.True(
            error <= result.Bound + (expected.Abs * check.Rounding),
            $"{check.Id}: {result.Value:R} is off by {error.ToDouble():G3}, the bound is {result.Bound:G3}; expected {expected}");
    }

    private static BigFloat Expected(CheckCase check) => BigFloat.Parse(
        check.Ask.What == "offered-traffic" ? check.Ask.Loss!.Value.ToString("R", CultureInfo.InvariantCulture) : check.Expected);
}
