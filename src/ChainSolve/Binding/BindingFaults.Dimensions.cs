using ChainSolve.Language.Syntax;
using ChainSolve.Language.Text;

namespace ChainSolve.Binding;

/// <summary>The words of faults about units and dimensions.</summary>
internal static partial class BindingFaults
{
    public static Fault UnlikeDimensions(string action, string first, Dimension firstIs, string second, Dimension secondIs, TextSpan span, string? mend) =>
        new(
            BindingCodes.UnlikeDimensions,
            $"{action}: {first} is {firstIs.Describe()} and {second} is {secondIs.Describe()}{Mend(mend)}",
            span)
        { LacksUnit = firstIs.IsPlain || secondIs.IsPlain };

    public static Fault WrongDimension(string place, Dimension needed, string text, Dimension found, TextSpan span, string? mend) =>
        new(
            BindingCodes.WrongDimension,
            $"{place} needs {needed.Describe()}; {text} is {found.Describe()}{Mend(mend)}",
            span)
        { LacksUnit = found.IsPlain };

    public static Fault UnitsMissing(TextSpan span, int units, int bare) =>
        new(
            BindingCodes.UnitsMissing,
            FormattableString.Invariant($"{(units == 1 ? "this one unit stands" : $"{units} units, of which this is the first, stand")} against {bare} numbers without the unit that their place needs; give every time and rate its unit, or leave out all units"),
            span);

    public static Fault UnitOnDimension(SourceText source, TextSpan operand, Dimension found, Identifier unit) =>
        new(
            BindingCodes.UnitMisused,
            $"{SourceWords.Quote(source, operand)} is {found.Describe()} already; leave out '{unit.Text}'",
            unit.Span);

    public static Fault PerNeedsTime(Identifier unit) =>
        new(BindingCodes.UnitMisused, $"behind 'per' stands a unit of time ({string.Join(' ', UnitScale.TimeWords)}), not '{unit.Text}'", unit.Span);

    public static Fault UnknownUnit(Identifier unit) =>
        new(BindingCodes.UnitMisused, $"unknown unit '{unit.Text}'; known are {string.Join(' ', UnitScale.TimeWords)} FIT %", unit.Span);

    public static Fault TimebaseUnknown(Identifier unit) =>
        new(BindingCodes.Timebase, $"'{unit.Text}' is not a unit of time; known are {string.Join(' ', UnitScale.TimeWords)}", unit.Span);

    public static Fault TimebaseUnitless(Identifier unit) =>
        new(BindingCodes.Timebase, $"no number of this file has a unit, so results have none either; give the times and rates their units or leave out 'timebase {unit.Text}'", unit.Span);

    public static Fault PowerNotWhole(SourceText source, TextSpan span, Dimension found) =>
        new(BindingCodes.PowerOfDimension, $"{SourceWords.Quote(source, span)} is {found.Describe()}; its power needs a written whole number, or divide by a unit first", span);

    public static Fault PowerTooLarge(TextSpan span) =>
        new(BindingCodes.PowerOfDimension, "this power of time is beyond 1000", span);

    public static Fault RootOfOddPower(SourceText source, TextSpan span, Dimension found) =>
        new(BindingCodes.PowerOfDimension, $"{SourceWords.Quote(source, span)} is {found.Describe()}, whose square root is no power of time; take the root of a product instead, such as sqrt(a * b)", span);

    private static string Mend(string? mend) => mend is null ? "" : $"; {mend}";
}
