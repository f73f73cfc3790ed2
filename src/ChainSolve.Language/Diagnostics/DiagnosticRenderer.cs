using System.Globalization;
using System.Text;

namespace ChainSolve.Language.Diagnostics;

/// <summary>Shows a diagnostic to people: place, code and message, then the line and a caret span under it.</summary>
/// <remarks>Safe to share between threads.</remarks>
public static class DiagnosticRenderer
{
    private const int Widest = 120;

    /// <summary>The diagnostic as three lines without a line end behind the last, or one where there is no text to show; tabs are shown as one blank.</summary>
    public static string Render(Diagnostic diagnostic)
    {
        ArgumentNullException.ThrowIfNull(diagnostic);
        var (line, column) = diagnostic.Position;
        var head = string.Create(CultureInfo.InvariantCulture, $"{diagnostic.Source.Name}:{line}:{column}  {diagnostic.Code}  {(diagnostic.Severity == Severity.Warning ? "warning: " : "")}{diagnostic.Message}");
        var text = diagnostic.Source.Line(line);
        if (string.IsNullOrWhiteSpace(text))
        {
            return head;
        }

        var lineStart = diagnostic.Source.StartOfLine(line);
        var from = Math.Min(diagnostic.Span.Start - lineStart, text.Length);
        var to = Math.Clamp(diagnostic.Span.End - lineStart, from, text.Length);

        // A long line is cut to a window around the place.
        var cut = from > Widest / 2 ? from - (Widest / 2) : 0;
        var end = Math.Min(text.Length, cut + Widest);
        if (cut > 0 && char.IsLowSurrogate(text[cut]))
        {
            cut--;
        }

        to = Math.Min(to, end);
        var shown = Printable(text[cut..end]);
        var blanks = Width(text.AsSpan(cut, from - cut));
        var carets = Math.Max(1, Width(text.AsSpan(from, Math.Max(0, to - from))));
        return $"{head}\n    {shown}\n    {new string(' ', blanks)}{new string('^', carets)}";
    }

    private static string Printable(string text)
    {
        var shown = new StringBuilder(text.Length);
        foreach (var rune in text.EnumerateRunes())
        {
            shown.Append(Rune.IsControl(rune) ? " " : rune.ToString());
        }

        return shown.ToString();
    }

    private static int Width(ReadOnlySpan<char> text)
    {
        var width = 0;
        foreach (var rune in text.EnumerateRunes())
        {
            if (Rune.GetUnicodeCategory(rune) is not (UnicodeCategory.NonSpacingMark or UnicodeCategory.EnclosingMark))
            {
                width++;
            }
        }

        return width;
    }
}
