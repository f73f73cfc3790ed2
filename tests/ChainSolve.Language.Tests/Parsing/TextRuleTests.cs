using System.Text;
using ChainSolve.Language.Parsing;
using ChainSolve.Language.Printing;
using ChainSolve.Language.Syntax;
using ChainSolve.Language.Tests.Support;
using ChainSolve.Language.Text;

namespace ChainSolve.Language.Tests.Parsing;

/// <summary>How a text is cut into statements, clauses, names and numbers.</summary>
public class TextRuleTests
{
    private const string Small =
        """
        # a pump
        item pump {  # with two states
            up -> down at 1
            down -> up at 2  # mended
        }

        let a = pump.up  # a count

        """;

    [Fact]
    public void Print_Comments_AreKept() => Assert.Equal(Small, ModelPrinter.Print(Read.Model(Small)));

    [Fact]
    public void Read_CarriageReturns_AreNotSeen() => Assert.Equal(Small, ModelPrinter.Print(Read.Model(Small.ReplaceLineEndings("\r\n"))));

    [Fact]
    public void FromBytes_ByteOrderMark_IsAccepted()
    {
        var reading = SourceReader.FromBytes("m.chain", [0xEF, 0xBB, 0xBF, .. Encoding.UTF8.GetBytes("let a = )")]);
        var fault = Assert.Single(ModelParser.Parse(reading.Text!).Diagnostics);
        Assert.Equal((1, 9), (fault.Position.Line, fault.Position.Column));
    }

    [Fact]
    public void Read_Columns_CountUnicodeScalars() => Assert.Equal(["1:17 L120"], Read.Faults("let a = 𝛌 + ψ + )"));

    [Fact]
    public void Read_NamesOfTwoForms_AreOneName()
    {
        var names = Read.Model("let caf\u00e9 = 1\nlet b = cafe\u0301").Statements.Cast<LetSyntax>().ToArray();
        Assert.Equal(names[0].Name.Text, Assert.IsType<NameSyntax>(names[1].Value).Name.Text);
    }

    [Theory]
    [InlineData("λ")]
    [InlineData("Ωmega_2")]
    [InlineData("a1")]
    [InlineData("x")]
    [InlineData("given1")]
    public void Read_LettersDigitsAndUnderscores_AreNames(string name) => Assert.Equal(name, Read.Statement<LetSyntax>($"let {name} = 1").Name.Text);

    [Theory]
    [InlineData("_a", "1:5 L110")]
    [InlineData("2a", "1:5 L120")]
    [InlineData("a-b", "1:6 L120")]
    public void Read_OtherNames_AreFaults(string name, string fault) => Assert.Equal([fault], Read.Faults($"let {name} = 1"));

    [Fact]
    public void Read_Names_CaseCounts() => Assert.NotEqual(Read.Statement<LetSyntax>("let A = 1").Name.Text, Read.Statement<LetSyntax>("let a = 1").Name.Text);

    [Theory]
    [InlineData("""model "a \"b\" \\ c" """, "a \"b\" \\ c")]
    [InlineData("""model "# no comment" """, "# no comment")]
    public void Read_Text_KeepsWhatIsEscaped(string text, string title) => Assert.Equal(title, Read.Statement<TitleSyntax>(text).Title);

    [Theory]
    [InlineData("model \"a", "1:7 L113")]
    [InlineData("model \"a\\n\"", "1:9 L113")]
    [InlineData("model \"a\nb\"", "1:7 L113")]
    public void Read_TextThatIsNotClosedOrHasAnUnknownEscape_IsAFault(string text, string fault) => Assert.Equal(fault, Read.Faults(text)[0]);

    [Theory]
    [InlineData("let a = f(1,\n2)")]
    [InlineData("let a =\n1")]
    [InlineData("let a = b =\n1")]
    [InlineData("let a = b !=\n1")]
    [InlineData("let a = b <\n1")]
    [InlineData("let a = b <=\n1")]
    [InlineData("let a = b >\n1")]
    [InlineData("let a = b >=\n1")]
    [InlineData("let a = b +\n1")]
    [InlineData("let a = b -\n1")]
    [InlineData("let a = b *\n1")]
    [InlineData("let a = b /\n1")]
    [InlineData("let a = b ^\n1")]
    [InlineData("let a = b and\nc")]
    [InlineData("let a = b or\nc")]
    [InlineData("let a = not\nb")]
    [InlineData("let a = 1 per\nh")]
    [InlineData("let a = if\nb then\n1 else\n2")]
    [InlineData("let a = b is\nup")]
    [InlineData("let a = (b\n+ 1\n)")]
    [InlineData("let a = f(\n1\n)")]
    [InlineData("given a = 1 in\n0 ..\n2")]
    [InlineData("measure m = probability a at\n1,\n2")]
    [InlineData("measure m = total a over\n1")]
    [InlineData("measure m = total a until\nb")]
    [InlineData("measure m = mean time to\nb")]
    [InlineData("reward r = 1 while\na")]
    [InlineData("event e at 1 when\na { }")]
    [InlineData("item a { u ->\nv at\n1 when\nb by\nc }")]
    [InlineData("event e at 1 { p:\na -> b }")]
    [InlineData("let a = 1 +  # the comment ends the line, not the statement\n\n\n2")]
    public void Read_LineEndBehindAJoint_DoesNotCount(string text)
    {
        Assert.Empty(Read.Faults(text));
        Assert.Single(Read.Kinds(text));
    }

    [Theory]
    [InlineData("let a = 1\n+ 2", "2:1 L123")]
    [InlineData("let a = b\nand c", "2:1 L123")]
    [InlineData("let a = b\nor c", "2:1 L123")]
    [InlineData("let a = 1\nper h", "2:1 L123")]
    [InlineData("measure m = probability a\nat 1", "1:26 L120")]
    [InlineData("item a { u -> v at 1\nwhen b }", "2:1 L123")]
    [InlineData("item a { u -> v at 1\nby c }", "2:1 L123")]
    [InlineData("item a { u -> v at 1\nnamed c }", "2:1 L123")]
    [InlineData("reward r { rate 1\nwhile a }", "2:1 L123")]
    [InlineData("let a = if b\nthen 1\nelse 2", "1:13 L120")]
    public void Read_LineThatBeginsWithAJoint_IsAFault(string text, string fault) => Assert.Contains(fault, Read.Faults(text));

    [Theory]
    [InlineData("let a = (1 + 2\nlet b = 3", "1:9 L122")]
    [InlineData("let a = f(1,\nlet b = 3", "1:13 L120")]
    [InlineData("let a =\nlet b = 3", "1:8 L120")]
    [InlineData("let a = 1 +\nlet b = 3", "1:12 L120")]
    public void Read_StatementThatIsNotFinished_SwallowsNothing(string text, string fault)
    {
        Assert.Equal([fault], Read.Faults(text));
        Assert.Equal(["Let"], Read.Kinds(text));
    }

    [Theory]
    [InlineData("item a { u -> v at 1; v -> u at 1 }")]
    [InlineData("item a { u -> v at 1\nv -> u at 1 }")]
    [InlineData("item a {\n\nu -> v at 1;;\n;v -> u at 1;\n}")]
    [InlineData("item a { u -> v at 1 { n = 1 } ; v -> u at 1 }")]
    [InlineData("item a { v -> u at 1 ; u -> v at 1 { n = 1 }}")]
    [InlineData("item a { u -> v at 1 { n = 1 }  # done\n v -> u at 1 }")]
    public void Read_Clauses_EndWithTheLineASemicolonOrTheBrace(string text) => Assert.Equal(2, Read.Statement<ItemSyntax>(text).Clauses.Count);

    [Theory]
    [InlineData("item a\n{ u -> v at 1 }", "2:1 L123")]
    [InlineData("item a { u -> v at 1 } let b = 1", "1:24 L120")]
    [InlineData("item a { u -> v at 1 { n = 1 } named b }", "1:32 L120")]
    [InlineData("item a { u -> v at 1", "1:8 L122")]
    [InlineData("let a = 1 }", "1:11 L122")]
    [InlineData("let a = 1; let b = 2", "1:10 L120")]
    public void Read_BracesAndSemicolonsOutOfPlace_AreFaults(string text, string fault) => Assert.Contains(fault, Read.Faults(text));

    [Theory]
    [InlineData("12", 12)]
    [InlineData("0.5", 0.5)]
    [InlineData("1e-6", 1e-6)]
    [InlineData("1e+6", 1e6)]
    [InlineData("1E6", 1e6)]
    [InlineData("1_000", 1000)]
    [InlineData("1_000.25e1_0", 1000.25e10)]
    [InlineData("0", 0)]
    public void Read_Number_HasItsValue(string text, double value)
    {
        var number = Assert.IsType<NumberSyntax>(Read.Statement<LetSyntax>($"let a = {text}").Value);
        Assert.Equal((value, text), (number.Value, number.Text));
    }

    [Theory]
    [InlineData("0..3", "0 .. 3")]
    [InlineData("1e-6..2", "1e-6 .. 2")]
    [InlineData("0 .. 3", "0 .. 3")]
    public void Read_TwoDots_AreARange(string range, string shape) => Assert.Equal(shape, Shape.Of(Read.Statement<CounterSyntax>($"counter n {range}").Range));

    [Theory]
    [InlineData(".5", "a number needs digits on both sides of its dot; write '0.5'")]
    [InlineData("5.", "a number needs digits on both sides of its dot; write '5.0' or '5'")]
    [InlineData("0,5", "'0,5' is not a number here; write '0.5' for a decimal, '0, 5' for a list")]
    [InlineData("1e999", "the number 1e999 is too large; the largest is about 1.8e308")]
    public void Read_NumberOfAnotherForm_IsAFaultThatShowsTheRightOne(string text, string message) =>
        Assert.Contains(message, Read.Rendered($"let a = {text}"), StringComparison.Ordinal);

    [Theory]
    [InlineData("1e-6 .. 1e-3 per h", "[1e-6 Per h] .. [1e-3 Per h]")]
    [InlineData("1 .. 5 %", "[1 %] .. [5 %]")]
    [InlineData("1 .. 2 h", "[1 h] .. [2 h]")]
    [InlineData("1 d .. 48 h", "[1 d] .. [48 h]")]
    [InlineData("0 .. 2 per 1000 h", "[0 Per 1000 h] .. [2 Per 1000 h]")]
    public void Read_Range_BareLowEndTakesTheUnitOfTheHighEnd(string range, string shape) =>
        Assert.Equal(shape, Shape.Of(Read.Statement<GivenSyntax>($"given a = 1 in {range}").Range));

    [Fact]
    public void Read_UnitOnTheLowEndAlone_IsAFault() => Assert.Equal(["1:16 L127"], Read.Faults("given a = 1 in 1 h .. 2"));

    [Theory]
    [InlineData("if")]
    [InlineData("then")]
    [InlineData("else")]
    [InlineData("and")]
    [InlineData("or")]
    [InlineData("not")]
    [InlineData("per")]
    [InlineData("is")]
    [InlineData("at")]
    [InlineData("over")]
    [InlineData("until")]
    [InlineData("steady")]
    [InlineData("when")]
    [InlineData("while")]
    [InlineData("by")]
    public void Read_ReservedWordAsAName_IsAFault(string word) => Assert.Equal(["1:5 L129"], Read.Faults($"let {word} = 1"));

    [Theory]
    [InlineData("x")]
    [InlineData("all")]
    [InlineData("start")]
    [InlineData("states")]
    [InlineData("first")]
    [InlineData("test")]
    [InlineData("item")]
    [InlineData("given")]
    [InlineData("measure")]
    [InlineData("rate")]
    [InlineData("each")]
    [InlineData("rank")]
    [InlineData("mean")]
    [InlineData("after")]
    [InlineData("step")]
    [InlineData("any")]
    [InlineData("h")]
    [InlineData("min")]
    public void Read_AnyOtherWord_NamesStatesItemsAndLets(string word)
    {
        var text = $"item {word} x 2 {{\n    {word} -> other at 1 named {word}\n    other -> {word} at 1\n}}\nlet a = {word}.{word} + {word}\n";
        Assert.Equal(text, ModelPrinter.Print(Read.Model(text)));
        Assert.Equal(["Item", "Let"], Read.Kinds(text));
    }

    [Fact]
    public void Read_TextThatIsTooLargeEmptyOrNotUtf8_IsOneFault()
    {
        static string Code(byte[] bytes) => SourceReader.FromBytes("m.chain", bytes).Fault!.Code;
        Assert.Equal("L102", Code(new byte[SourceReader.LargestSize + 1]));
        Assert.Equal("L103", Code([]));
        Assert.Equal("L103", Code([0xEF, 0xBB, 0xBF]));
        Assert.Equal("L103", Code(" \r\n\t\n"u8.ToArray()));
        Assert.Equal("L101", Code([0x61, 0xFF, 0x62]));
        Assert.Equal("L101", Code([0x61, 0xC3]));
        Assert.Null(SourceReader.FromBytes("m.chain", [.. Enumerable.Repeat((byte)'#', SourceReader.LargestSize)]).Fault);
    }
}
