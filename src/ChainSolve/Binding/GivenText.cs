using System.Globalization;
using ChainSolve.Modelling;

namespace ChainSolve.Binding;

/// <summary>Values of givens as people write them.</summary>
internal static class GivenText
{
    /// <summary>A value with its unit: the one of the given's own expression, otherwise made from the time base.</summary>
    public static string Show(double value, BoundGiven given, TimeBase timeBase)
    {
        var unit = given.OutsideUnit;
        return WithUnit(unit?.FromBase(value) ?? value, unit?.Text ?? BaseUnit(given.TimePower, timeBase));
    }

    public static string Number(double value) => double.IsNaN(value) ? "no number" : value.ToString("G12", CultureInfo.InvariantCulture);

    public static string WithUnit(double value, string unit) => unit.Length == 0 || double.IsNaN(value) ? Number(value) : $"{Number(value)} {unit}";

    /// <summary>The unit of a power of time in the time base: <c>h</c>, <c>per h</c>; empty for a plain number.</summary>
    public static string BaseUnit(int power, TimeBase timeBase) => (power, timeBase.IsUnitless) switch
    {
        (0, _) or (_, true) => "",
        (1, _) => timeBase.Unit,
        (-1, _) => $"per {timeBase.Unit}",
        ( > 1, _) => FormattableString.Invariant($"{timeBase.Unit}^{power}"),
        _ => FormattableString.Invariant($"per {timeBase.Unit}^{-power}"),
    };
}
