using System.Globalization;
using ChainSolve.Modelling;

namespace ChainSolve;

/// <summary>Shows values of givens in the units in which they were written.</summary>
internal static class GivenView
{
    public static GivenInfo Of(BoundGiven given, double value, TimeBase timeBase)
    {
        if (given.OutsideUnit is not { } unit)
        {
            return new GivenInfo(given.Name, value, BaseUnit(given.TimePower, timeBase));
        }

        // What people wrote is a short number: it is taken where it means the same value.
        var shown = value / unit.Factor;
        var rounded = double.IsFinite(shown)
            ? double.Parse(shown.ToString("G15", CultureInfo.InvariantCulture), CultureInfo.InvariantCulture)
            : shown;
        return new GivenInfo(given.Name, Math.Abs((rounded * unit.Factor) - value) <= Math.Abs(value) * 2.3e-16 ? rounded : shown, unit.Text);
    }

    private static string BaseUnit(int power, TimeBase timeBase) => (power, timeBase.IsUnitless) switch
    {
        (0, _) or (_, true) => "",
        (1, _) => timeBase.Unit,
        (-1, _) => $"per {timeBase.Unit}",
        ( > 1, _) => FormattableString.Invariant($"{timeBase.Unit}^{power}"),
        _ => FormattableString.Invariant($"per {timeBase.Unit}^{-power}"),
    };
}
