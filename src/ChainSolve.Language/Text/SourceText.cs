namespace ChainSolve.Language.Text;

/// <summary>A named text with its lines. Immutable; safe to share between threads.</summary>
public sealed class SourceText
{
    private readonly int[] lineStarts;

    /// <summary>Creates a text.</summary>
    /// <param name="name">The name shown in messages, usually the file's name.</param>
    /// <param name="content">The characters; a byte-order mark at the start is dropped.</param>
    public SourceText(string name, string content)
    {
        ArgumentNullException.ThrowIfNull(name);
        ArgumentNullException.ThrowIfNull(content);
        Name = name;
        Content = content.StartsWith('\uFEFF') ? content[1..] : content;
        lineStarts = FindLineStarts(Content);
    }

    /// <summary>The name shown in messages.</summary>
    public string Name { get; }

    /// <summary>The characters.</summary>
    public string Content { get; }

    /// <summary>The number of lines; at least 1.</summary>
    public int LineCount => lineStarts.Length;

    /// <summary>Line and column of an offset; offsets behind the end count as the end.</summary>
    public TextPosition PositionOf(int offset)
    {
        offset = Math.Clamp(offset, 0, Content.Length);
        var line = Array.BinarySearch(lineStarts, offset);
        line = line >= 0 ? line : ~line - 1;
        var column = 1;
        foreach (var _ in Content.AsSpan(lineStarts[line], offset - lineStarts[line]).EnumerateRunes())
        {
            column++;
        }

        return new TextPosition(line + 1, column);
    }

    /// <summary>The text of a line, without its line end.</summary>
    /// <param name="line">Line number, from 1.</param>
    public string Line(int line)
    {
        ArgumentOutOfRangeException.ThrowIfLessThan(line, 1);
        ArgumentOutOfRangeException.ThrowIfGreaterThan(line, LineCount);
        var start = lineStarts[line - 1];
        var end = line < LineCount ? lineStarts[line] : Content.Length;
        return Content[start..end].TrimEnd('\r', '\n');
    }

    /// <summary>The offset of the first character of a line.</summary>
    /// <param name="line">Line number, from 1.</param>
    public int StartOfLine(int line)
    {
        ArgumentOutOfRangeException.ThrowIfLessThan(line, 1);
        ArgumentOutOfRangeException.ThrowIfGreaterThan(line, LineCount);
        return lineStarts[line - 1];
    }

    /// <summary>The characters of a span.</summary>
    public string Slice(TextSpan span) => Content.Substring(span.Start, span.Length);

    private static int[] FindLineStarts(string content)
    {
        var starts = new List<int> { 0 };
        for (var i = 0; i < content.Length; i++)
        {
            if (content[i] == '\n')
            {
                starts.Add(i + 1);
            }
        }

        return [.. starts];
    }
}
