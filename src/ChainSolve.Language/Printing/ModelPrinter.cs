using System.Text;
using ChainSolve.Language.Syntax;
using ChainSolve.Language.Text;

namespace ChainSolve.Language.Printing;

/// <summary>Writes a syntax tree as text again, in one canonical layout that keeps the comments.</summary>
/// <remarks>
/// Reading the result gives the same tree apart from the places in the text, and printing that gives the same text. A comment that stands on a
/// line of its own keeps a line of its own; one behind a statement or clause stays behind it. Blank lines between statements are kept, one at most.
/// Safe to share between threads. Cost: linear in the length of the text.
/// </remarks>
public static class ModelPrinter
{
    private const string Step = "    ";

    /// <summary>The text of a model, with a line end behind every line.</summary>
    public static string Print(ModelSyntax model)
    {
        ArgumentNullException.ThrowIfNull(model);
        var text = new StringBuilder();
        var comments = new Queue<TextSpan>(model.Comments);
        var source = model.Source;
        var last = 0;
        foreach (var statement in model.Statements)
        {
            foreach (var line in StatementPrinter.Lines(statement))
            {
                WriteOwnLines(text, source, comments, line.Start, ref last, line.Depth + (line.Text == "}" ? 1 : 0));
                Separate(text, source, last, line.Start);
                text.Append(Indent(line.Depth)).Append(line.Text);
                last = Math.Max(last, line.Text.EndsWith('{') ? line.Start : line.End);
                WriteTrailing(text, source, comments, line, ref last);
                text.Append('\n');
            }
        }

        WriteOwnLines(text, source, comments, int.MaxValue, ref last, 0);
        return text.ToString();
    }

    // Comments in front of a line, each on a line of its own.
    private static void WriteOwnLines(StringBuilder text, SourceText source, Queue<TextSpan> comments, int before, ref int last, int depth)
    {
        while (comments.TryPeek(out var comment) && comment.Start < before)
        {
            comments.Dequeue();
            Separate(text, source, last, comment.Start);
            text.Append(Indent(depth)).Append(source.Slice(comment).TrimEnd()).Append('\n');
            last = comment.End;
        }
    }

    // The comment that ends the line on which the printed line ends. One inside a statement that was written over several lines goes there too,
    // where it is the only one; the others were put above.
    private static void WriteTrailing(StringBuilder text, SourceText source, Queue<TextSpan> comments, PrintedLine line, ref int last)
    {
        if (!comments.TryPeek(out var comment))
        {
            return;
        }

        var end = line.Text.EndsWith('{') ? line.Start : line.End;
        if (source.PositionOf(comment.Start).Line == source.PositionOf(end).Line && comment.Start >= end)
        {
            comments.Dequeue();
            text.Append(' ', 2).Append(source.Slice(comment).TrimEnd());
            last = comment.End;
        }
    }

    private static void Separate(StringBuilder text, SourceText source, int last, int start)
    {
        if (text.Length > 0 && source.PositionOf(start).Line - source.PositionOf(last).Line > 1 && !EndsBlank(text))
        {
            text.Append('\n');
        }
    }

    private static bool EndsBlank(StringBuilder text) => text.Length > 1 && text[^1] == '\n' && text[^2] == '\n';

    private static string Indent(int depth) => string.Concat(Enumerable.Repeat(Step, depth));
}
