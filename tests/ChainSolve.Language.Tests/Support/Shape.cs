using ChainSolve.Language.Syntax;

namespace ChainSolve.Language.Tests.Support;

/// <summary>Writes an expression with every operation in square brackets, so that a test sees how it was read.</summary>
internal static class Shape
{
    public static string Of(string text) => Of(Read.Expression(text));

    public static string Of(ExpressionSyntax? expression) => expression switch
    {
        null => "-",
        NumberSyntax number => number.Text,
        UnitSyntax unit => $"[{Of(unit.Operand)} {unit.Unit.Text}]",
        NameSyntax name => name.Name.Text,
        CallSyntax call => $"{call.Function.Text}({string.Join(", ", call.Arguments.Select(Of))})",
        MemberSyntax member => $"{member.Owner.Text}.{member.Member.Text}",
        IsSyntax test => $"[{test.Owner.Text} is {test.Member.Text}]",
        BracketSyntax bracket => $"({Of(bracket.Inner)})",
        UnarySyntax unary => $"[{unary.Operator} {Of(unary.Operand)}]",
        BinarySyntax binary => $"[{Of(binary.Left)} {binary.Operator} {Of(binary.Right)}]",
        ChainSyntax chain => $"[{Of(chain.First)}{string.Concat(chain.Rest.Select(l => $" {l.Operator} {Of(l.Operand)}"))}]",
        PerUnitSyntax per => (per.Count is { } count ? count.Text + " " : "") + per.Unit.Text,
        ConditionalSyntax conditional => $"[if {Of(conditional.Condition)} then {Of(conditional.WhenTrue)} else {Of(conditional.WhenFalse)}]",
        _ => throw new ArgumentException($"no shape for {expression.GetType().Name}", nameof(expression)),
    };

    public static string Of(RangeSyntax? range) => range is null ? "-" : $"{Of(range.Low)} .. {Of(range.High)}";
}
