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
        var position = diagnostic.Position;
        var color = diagnostic.Severity == Severity.Fault ? Red : Yellow;
        var word = diagnostic.Severity == Severity.Warning ? "warning: " : "";
        writer.WriteLine($"{diagnostic.Source.Name}:{position.Line}:{position.Column}  {Paint(diagnostic.Code, color)}  {word}{diagnostic.Message}");

        var line = diagnostic.Source.Line(position.Line).TrimEnd();
        if (line.Length == 0)
        {
            return;
        }

        writer.WriteLine($"    {line.Replace('\t', ' ')}");
        writer.WriteLine($"    {new string(' ', position.Column - 1)}{Paint(new string('^', CaretLength(diagnostic)), color)}");
    }

    // A span that goes on below is marked to the end of its first line.
    private static int CaretLength(Diagnostic diagnostic)
    {
        var source = diagnostic.Source;
        var start = diagnostic.Position;
        var end = source.PositionOf(diagnostic.Span.End);
        var length = end.Line == start.Line ? end.Column - start.Column : RuneCount(source.Line(start.Line)) - start.Column + 1;
        return Math.Max(1, length);
    }

    private static int RuneCount(string text) => text.EnumerateRunes().Count();

    private string Paint(string text, string color) => useColor ? color + text + Plain : text;
}
