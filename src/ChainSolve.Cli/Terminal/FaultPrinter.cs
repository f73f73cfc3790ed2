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
        var lines = DiagnosticRenderer.Render(diagnostic).Split('\n');
        if (useColor)
        {
            var color = diagnostic.Severity == Severity.Fault ? Red : Yellow;
            var at = lines[0].IndexOf(diagnostic.Code, diagnostic.Source.Name.Length, StringComparison.Ordinal);
            lines[0] = $"{lines[0][..at]}{color}{diagnostic.Code}{Plain}{lines[0][(at + diagnostic.Code.Length)..]}";
            var carets = lines[^1].IndexOf('^', StringComparison.Ordinal);
            lines[^1] = lines.Length == 3 ? $"{lines[^1][..carets]}{color}{lines[^1][carets..]}{Plain}" : lines[^1];
        }

        writer.WriteLine(string.Join(Environment.NewLine, lines));
    }
}
