using ChainSolve.Language.Parsing;
using ChainSolve.Language.Syntax;
using ChainSolve.Language.Tests.Support;
using ChainSolve.Language.Text;

namespace ChainSolve.Language.Tests.Parsing;

public sealed class ExpressionTests
{
    [Theory]
    [InlineData("a or b and not c", "[a Or [b And [Not c]]]")]
    [InlineData("a or b or c", "[a Or b Or c]")]
    [InlineData("not a = b", "[Not [a Equal b]]")]
    [InlineData("not not a", "[Not [Not a]]")]
    [InlineData("a < b and c >= d", "[[a Less b] And [c GreaterOrEqual d]]")]
    [InlineData("a != b or c <= d or e > f", "[[a NotEqual b] Or [c LessOrEqual d] Or [e Greater f]]")]
    [InlineData("a + b < c - d", "[[a Add b] Less [c Subtract d]]")]
    [InlineData("a - b - c", "[a Subtract b Subtract c]")]
    [InlineData("a + b * c - d / e", "[a Add [b Multiply c] Subtract [d Divide e]]")]
    [InlineData("a / b * c", "[a Divide b Multiply c]")]
    [InlineData("-a * b", "[[Negate a] Multiply b]")]
    [InlineData("a * -b", "[a Multiply [Negate b]]")]
    [InlineData("a - -b", "[a Subtract [Negate b]]")]
    [InlineData("-2^2", "[Negate [2 Power 2]]")]
    [InlineData("2^-1", "[2 Power [Negate 1]]")]
    [InlineData("2^3^2", "[2 Power [3 Power 2]]")]
    [InlineData("a * b^c", "[a Multiply [b Power c]]")]
    [InlineData("(a + b) * c", "[([a Add b]) Multiply c]")]
    public void Read_Operators_BindAsInTheTableOfPrecedence(string text, string shape) => Assert.Equal(shape, Shape.Of(text));

    [Theory]
    [InlineData("1/20 h", "[1 Divide [20 h]]")]
    [InlineData("1/700 per h", "[1 Divide 700 Per h]")]
    [InlineData("2 per 1000 h * n", "[2 Per 1000 h Multiply n]")]
    [InlineData("35 per h * pump.down", "[35 Per h Multiply pump.down]")]
    [InlineData("-9 h", "[Negate [9 h]]")]
    [InlineData("9h", "[9 h]")]
    [InlineData("3 d + 4 h", "[[3 d] Add [4 h]]")]
    [InlineData("(3 + 4) h", "[([3 Add 4]) h]")]
    [InlineData("5 %", "[5 %]")]
    [InlineData("5% * n", "[[5 %] Multiply n]")]
    [InlineData("40 FIT", "[40 FIT]")]
    [InlineData("(9 h)^2", "[([9 h]) Power 2]")]
    [InlineData("2^3 h", "[2 Power [3 h]]")]
    public void Read_Units_BindTightestAndPerOnTheLevelOfProducts(string text, string shape) => Assert.Equal(shape, Shape.Of(text));

    [Theory]
    [InlineData("ms")]
    [InlineData("s")]
    [InlineData("min")]
    [InlineData("h")]
    [InlineData("d")]
    [InlineData("wk")]
    [InlineData("mo")]
    [InlineData("y")]
    [InlineData("FIT")]
    public void Read_EveryUnitWord_IsAUnitBehindANumberAndANameElsewhere(string unit)
    {
        Assert.Equal($"[3 {unit}]", Shape.Of($"3 {unit}"));
        Assert.Equal($"[{unit} Add 1]", Shape.Of($"{unit} + 1"));
        Assert.Equal($"{unit}(1, 2)", Shape.Of($"{unit}(1, 2)"));
        Assert.Equal($"{unit}.{unit}", Shape.Of($"{unit}.{unit}"));
    }

    [Theory]
    [InlineData("f(1) h")]
    [InlineData("b h")]
    [InlineData("P.s h")]
    [InlineData("9 h h")]
    public void Read_UnitNotBehindANumberOrBracket_IsAFault(string text) => Assert.Equal([$"1:{8 + text.Length} L120"], Read.Faults($"let a = {text}"));

    [Theory]
    [InlineData("9 h^2", "1:12 L127")]
    [InlineData("9 % ^ 2", "1:13 L127")]
    [InlineData("1 per h^2", "1:16 L127")]
    [InlineData("1 per 1000 h^2", "1:21 L127")]
    public void Read_PowerBehindAUnit_IsAFault(string text, string fault) => Assert.Equal([fault], Read.Faults($"let a = {text}"));

    [Theory]
    [InlineData("if a then b else c", "[if a then b else c]")]
    [InlineData("if a or b then 1 + 2 else 3 * 4", "[if [a Or b] then [1 Add 2] else [3 Multiply 4]]")]
    [InlineData("if a then b else if c then d else e", "[if a then b else [if c then d else e]]")]
    [InlineData("if a then if b then c else d else e", "[if a then [if b then c else d] else e]")]
    [InlineData("1 + (if a then b else c)", "[1 Add ([if a then b else c])]")]
    [InlineData("max(if a then b else c, 1)", "max([if a then b else c], 1)")]
    public void Read_Conditional_IsLoosest(string text, string shape) => Assert.Equal(shape, Shape.Of(text));

    [Theory]
    [InlineData("1 + if a then b else c")]
    [InlineData("-if a then b else c")]
    [InlineData("2^if a then b else c")]
    [InlineData("not if a then b else c")]
    [InlineData("x or if a then b else c")]
    public void Read_ConditionalAsOperandWithoutBrackets_IsAFault(string text) => Assert.EndsWith("L128", Assert.Single(Read.Faults($"let a = {text}")));

    [Theory]
    [InlineData("min(a, b)", "min(a, b)")]
    [InlineData("count(a = 1, P is s, c)", "count([a Equal 1], [P is s], c)")]
    [InlineData("f(g(1), (2))", "f(g(1), (2))")]
    [InlineData("f()", "f()")]
    [InlineData("pump.up", "pump.up")]
    [InlineData("pump . up", "pump.up")]
    [InlineData("pump is up", "[pump is up]")]
    [InlineData("not pump is up and x", "[[Not [pump is up]] And x]")]
    [InlineData("P is a or b", "[[P is a] Or b]")]
    [InlineData("2 * pump.up^2", "[2 Multiply [pump.up Power 2]]")]
    public void Read_CallsStatesAndIs_AreOperands(string text, string shape) => Assert.Equal(shape, Shape.Of(text));

    [Theory]
    [InlineData("a < b < c", "1:15 L125")]
    [InlineData("a = b = c", "1:15 L125")]
    [InlineData("a < b != c", "1:15 L125")]
    [InlineData("P is not a", "1:14 L126")]
    public void Read_FormsThatMislead_AreFaults(string text, string fault) => Assert.Equal([fault], Read.Faults($"let a = {text}"));

    [Theory]
    [InlineData("(")]
    [InlineData("f(")]
    public void Read_NestingOf128_IsReadAnd129IsAFault(string open)
    {
        string Nested(int depth) => string.Concat(Enumerable.Repeat(open, depth)) + "1" + new string(')', depth);
        Assert.Empty(Read.Faults($"let a = {Nested(128)}"));
        Assert.Equal([$"1:{9 + (128 * open.Length) + open.Length - 1} L124"], Read.Faults($"let a = {Nested(129)}"));
    }

    [Theory]
    [InlineData("-")]
    [InlineData("not ")]
    [InlineData("2^")]
    [InlineData("if a then b else ")]
    [InlineData("if a then ")]
    public void Read_WithoutEndNested_IsAFaultAndNotACrash(string piece) =>
        Assert.Contains("L124", Assert.Single(Read.Faults($"let a = {string.Concat(Enumerable.Repeat(piece, 100_000))}1")));

    [Theory]
    [InlineData(" + ", ChainOperator.Add)]
    [InlineData(" or ", ChainOperator.Or)]
    [InlineData(" and ", ChainOperator.And)]
    [InlineData(" * ", ChainOperator.Multiply)]
    public void Read_ChainOf100000Terms_IsFlat(string between, ChainOperator expected)
    {
        var text = string.Join(between, Enumerable.Repeat("x", 100_000));
        var chain = Assert.IsType<ChainSyntax>(Read.Expression(text));
        Assert.Equal(99_999, chain.Rest.Count);
        Assert.All(chain.Rest, l => Assert.Equal(expected, l.Operator));
    }

    [Fact]
    public void ParseExpression_LineEnds_DoNotCount() => Assert.Equal("[1 Add 2]", Shape.Of("1\n+\n2\n"));

    [Theory]
    [InlineData("", "L120")]
    [InlineData("# only a comment", "L120")]
    [InlineData("1 2", "L120")]
    [InlineData("1 )", "L120")]
    [InlineData("0,5", "L111")]
    public void ParseExpression_NoSingleValue_IsAFault(string text, string code)
    {
        var result = ModelParser.ParseExpression(new SourceText("value", text));
        Assert.Null(result.Expression);
        Assert.Equal(code, Assert.Single(result.Diagnostics).Code);
    }
}
