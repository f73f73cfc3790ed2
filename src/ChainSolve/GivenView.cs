using System.Globalization;
using ChainSolve.Binding;
using ChainSolve.Modelling;

namespace ChainSolve;

/// <summary>Shows values of givens in the units in which they were written.</summary>
internal static class GivenView
{
    public static GivenInfo Of(BoundGiven given, double value, TimeBase timeBase)
    {
        if (given.OutsideUnit is not { } unit)
        {
            return new GivenInfo(given.Name, value, GivenText.BaseUnit(given.TimePower, timeBase));
        }

        // What people wrote is a short number: it is taken where it means the same value.
        var shown = unit.FromBase(value);
        var rounded = double.IsFinite(shown)
            ? double.Parse(shown.ToString("G15", CultureInfo.InvariantCulture), CultureInfo.InvariantCulture)
            : shown;
        return new GivenInfo(given.Name, unit.ToBase(rounded) == value ? rounded : shown, unit.Text);
    }
}
