using ChainSolve.Cli.Terminal;
using ChainSolve.Language.Diagnostics;
using ChainSolve.Language.Text;

namespace ChainSolve.Cli.Tests.Terminal;

public class FaultPrinterTests
{
    private static readonly SourceText Source = new("pump.chain", "item pump {\n  up -> döwn at lamda\n}\n");

    [Fact]
    public void Print_Fault_ShowsPlaceLineAndCarets()
    {
        var span = new TextSpan(Source.Content.IndexOf("lamda", StringComparison.Ordinal), 5);

        Assert.Equal(
            """
            pump.chain:2:17  B204  unknown name 'lamda'; nearest: 'lambda'
                  up -> döwn at lamda
                                ^^^^^

            """,
            Print(new Diagnostic("B204", Severity.Fault, "unknown name 'lamda'; nearest: 'lambda'", span, Source), false));
    }

    [Fact]
    public void Print_SpanOverLines_MarksTheFirstLineToItsEnd()
    {
        Assert.Equal(
            """
            pump.chain:1:6  B310  warning: never left
                item pump {
                     ^^^^^^

            """,
            Print(new Diagnostic("B310", Severity.Warning, "never left", new TextSpan(5, 20), Source), false));
    }

    [Fact]
    public void Print_EndOfText_NeedsNoLine()
    {
        Assert.Equal(
            "pump.chain:4:1  L101  unexpected end\n",
            Print(new Diagnostic("L101", Severity.Fault, "unexpected end", new TextSpan(Source.Content.Length, 0), Source), false));
    }

    [Fact]
    public void Print_WithColor_PaintsCodeAndCarets()
    {
        var text = Print(new Diagnostic("B204", Severity.Fault, "m", new TextSpan(0, 4), Source), true);

        Assert.Contains("\e[31mB204\e[0m", text, StringComparison.Ordinal);
        Assert.Contains("\e[31m^^^^\e[0m", text, StringComparison.Ordinal);
    }

    private static string Print(Diagnostic diagnostic, bool useColor)
    {
        using var writer = new StringWriter();
        new FaultPrinter(writer, useColor).Print([diagnostic]);
        return writer.ToString().ReplaceLineEndings("\n");
    }
}
