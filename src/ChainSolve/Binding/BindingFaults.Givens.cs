using ChainSolve.Language.Syntax;
using ChainSolve.Language.Text;

namespace ChainSolve.Binding;

/// <summary>The words of faults about the values of givens.</summary>
internal static partial class BindingFaults
{
    public static Fault UnknownLaw(Identifier law, IEnumerable<string> forms, IEnumerable<string> known) =>
        new(BindingCodes.UnknownLaw, $"unknown distribution '{law.Text}'; there are {string.Join(", ", forms)}", law.Span) { Hint = Nearest(law.Text, known) };

    public static Fault BetaNeedsPlain(Identifier law, Dimension found) =>
        new(BindingCodes.LawParameters, $"'beta' lies between 0 and 1, but this given is {found.Describe()}; take another distribution", law.Span);

    public static Fault LawParameters(TextSpan span, string law, string rule) =>
        new(BindingCodes.LawParameters, $"'{law}' needs {rule}", span);

    public static Fault OutOfRange(TextSpan span, string name, string value, string low, string high) =>
        new(BindingCodes.OutOfRange, $"'{name}' is {value}, outside its range {low} .. {high}", span);

    public static Fault RangeBackwards(TextSpan span, string low, string high) =>
        new(BindingCodes.OutOfRange, $"the range begins at {low} and ends before that, at {high}; exchange the ends", span);

    public static Fault NotFinite(TextSpan span, string name, double value) =>
        new(BindingCodes.NotFinite, FormattableString.Invariant($"'{name}' comes out as {GivenText.Number(value)}; a given has to be a finite number"), span);

    public static Fault CrewNotWhole(TextSpan span, string name, double value) =>
        new(BindingCodes.NotWhole, FormattableString.Invariant($"crew '{name}' comes out with {value:R} members; that has to be a whole number from 0"), span);

    public static Fault UnknownGiven(TextSpan span, string name, IReadOnlyList<string> known) =>
        new(BindingCodes.UnknownGiven, $"unknown given '{name}'{(known.Count == 0 ? "; the model has none" : "")}", span) { Hint = Nearest(name, known) };

    public static Fault SetTwice(TextSpan span, string name) =>
        new(BindingCodes.SetTwice, $"'{name}' is set twice; keep one of both", span);

    public static Fault UnitWanted(TextSpan span, string name, Dimension dimension, string number, string unit) =>
        new(BindingCodes.UnitWanted, $"'{name}' is {dimension.Describe()} and its own expression ends in no single unit, so the value needs one: {number} {unit}", span);

    public static Fault PercentWanted(TextSpan span, string name, string number) =>
        new(BindingCodes.UnitWanted, $"'{name}' is written partly in '%', so a bare number is not clear; write it in '%', such as {number} %", span);

    public static Fault UnitUnwanted(TextSpan span) =>
        new(BindingCodes.UnitUnwanted, "the model has no units, so a value cannot have one either; leave it out", span);
}
