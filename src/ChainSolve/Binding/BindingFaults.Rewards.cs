using ChainSolve.Language.Syntax;
using ChainSolve.Language.Text;

namespace ChainSolve.Binding;

/// <summary>The words of faults about rewards, measures and their times.</summary>
internal static partial class BindingFaults
{
    public static Fault RewardEmpty(Identifier reward) =>
        new(BindingCodes.RewardEmpty, $"reward '{reward.Text}' earns nothing; add a line with 'rate' or 'each'", reward.Span);

    public static Fault RewardDimension(SourceText source, TextSpan span, Dimension total, TextSpan before, Dimension totalBefore) =>
        new(
            BindingCodes.RewardDimension,
            $"this line adds up to {total.Describe()}, but {SourceWords.Quote(source, before)} to {totalBefore.Describe()}; a rate times time has the dimension of what is earned each time",
            span)
        { LacksUnit = total.IsPlain || totalBefore.IsPlain };

    public static Fault MeasureForm(MeasureSyntax measure, string kind, string forms) =>
        new(BindingCodes.MeasureForm, $"'{kind}' is written {forms}", measure.Name.Span);

    public static Fault NotAnObject(SourceText source, TextSpan span) =>
        new(
            BindingCodes.NotAnObject,
            $"{SourceWords.Quote(source, span)} cannot be measured as it stands; put it in brackets, or measure a reward, a counter, a let or ITEM.STATE",
            span);

    public static Fault WhileOfCondition(SourceText source, TextSpan span) =>
        new(BindingCodes.NotAnObject, $"{SourceWords.Quote(source, span)} is a condition; join two conditions with 'and' rather than 'while'", span);

    public static Fault RewardInBrackets(Identifier reward) =>
        new(BindingCodes.WrongKind, $"'{reward.Text}' is a reward, which is measured by its bare name; leave out the brackets", reward.Span);

    public static Fault ShareOutOfRange(TextSpan span, double share) =>
        new(BindingCodes.ShareOutOfRange, FormattableString.Invariant($"the share of this quantile is {share:G12}; it lies between 0 and 1, such as 5 %"), span);

    public static Fault TimeNegative(TextSpan span, string time) =>
        new(BindingCodes.TimeNegative, $"this time is {time}; times are finite and not negative", span);

    public static Fault TimeStep(TextSpan span, string step) =>
        new(BindingCodes.TimeStep, $"the step is {step}; it has to be above 0", span);

    public static Fault TimeLogEnds(TextSpan span, string from) =>
        new(BindingCodes.TimeLog, $"with 'log' times begin above 0, not at {from}", span);

    public static Fault TimeLogPoints(TextSpan span, double points) =>
        new(BindingCodes.TimeLog, FormattableString.Invariant($"behind 'log' stands how many times there are, a whole number from 2, not {points:G12}"), span);

    public static Fault TooManyTimes(TextSpan span, double points, int most) =>
        new(BindingCodes.TooManyTimes, FormattableString.Invariant($"these are {points:G12} times; at most {most} are possible, so take a larger step"), span);

    public static Fault TimesBackwards(TextSpan span, string from, string to) =>
        new(BindingCodes.TimesBackwards, $"these times begin at {from} and end before that, at {to}; exchange the ends", span);
}
