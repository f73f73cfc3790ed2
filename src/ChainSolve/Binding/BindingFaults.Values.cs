using ChainSolve.Language.Text;

namespace ChainSolve.Binding;

/// <summary>The words of faults about counts, ranges and probabilities once givens have values.</summary>
internal static partial class BindingFaults
{
    public static Fault CountNotWhole(TextSpan span, string item, double count) =>
        new(BindingCodes.CountNotWhole, FormattableString.Invariant($"item '{item}' comes out with {count:G12} replicas; that has to be a whole number from 0"), span);

    public static Fault StartNotWhole(TextSpan span, string item, string state, double count) =>
        new(BindingCodes.StartSum, FormattableString.Invariant($"{count:G12} replicas of item '{item}' start in '{state}'; that has to be a whole number from 0"), span);

    public static Fault StartCountSum(TextSpan span, string item, double sum, double count) =>
        new(BindingCodes.StartSum, FormattableString.Invariant($"the start of item '{item}' adds up to {sum:G12}, but it has {count:G12} replicas"), span);

    public static Fault StartShareSum(TextSpan span, string item, double sum) =>
        new(BindingCodes.StartSum, FormattableString.Invariant($"the probabilities of the start of item '{item}' add up to {sum:G12}, not to 1"), span);

    public static Fault StartShare(TextSpan span, string item, string state, double share) =>
        new(BindingCodes.StartSum, FormattableString.Invariant($"the probability that item '{item}' starts in '{state}' is {share:G12}; it lies between 0 and 1"), span);

    public static Fault TargetShare(TextSpan span, double share) =>
        new(BindingCodes.TargetSum, FormattableString.Invariant($"the probability of a target is {share:G12}; it lies between 0 and 1"), span);

    public static Fault TargetSum(TextSpan span, double sum) =>
        new(BindingCodes.TargetSum, FormattableString.Invariant($"the probabilities of these targets add up to {sum:G12}, not to 1"), span);

    public static Fault CounterNotWhole(TextSpan span, string counter, string what, double value) =>
        new(BindingCodes.CounterRange, FormattableString.Invariant($"the {what} of counter '{counter}' is {value:G12}; that has to be a whole number"), span);

    public static Fault CounterBackwards(TextSpan span, string counter, double low, double high) =>
        new(BindingCodes.CounterRange, FormattableString.Invariant($"the range of counter '{counter}' begins at {low:G12} and ends before that, at {high:G12}; exchange the ends"), span);

    public static Fault CounterStart(TextSpan span, string counter, double start, double low, double high) =>
        new(BindingCodes.CounterRange, FormattableString.Invariant($"counter '{counter}' starts at {start:G12}, outside its range {low:G12} .. {high:G12}"), span);
}
