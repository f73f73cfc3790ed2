using ChainSolve.Language.Diagnostics;

namespace ChainSolve.Cli.Terminal;

/// <summary>Shows faults and warnings with the line they stand on and a caret under the place.</summary>
internal sealed class FaultPrinter(TextWriter writer, bool useColor)
{
    private const string Red = "\e[31m";
    private const string Yellow = "\e[33m";
    private const string Plain = "\e[0m";

    public void Print(IEnumerable<Diagnostic> diagnostics)
    {
        foreach (var diagnostic in diagnostics)
        {
            Print(diagnostic);
        }
    }

    private void Print(Diagnostic diagnostic)
    {
        var text = DiagnosticRenderer.Render(diagnostic);
        if (useColor)
        {
            var at = text.IndexOf(diagnostic.Code, diagnostic.Source.Name.Length, StringComparison.Ordinal);
            var color = diagnostic.Severity == Severity.Fault ? Red : Yellow;
            text = $"{text[..at]}{color}{diagnostic.Code}{Plain}{text[(at + diagnostic.Code.Length)..]}";
        }

        writer.WriteLine(text.ReplaceLineEndings());
    }
}
