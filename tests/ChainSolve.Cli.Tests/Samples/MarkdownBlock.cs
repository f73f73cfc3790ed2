namespace ChainSolve.Cli.Tests.Samples;

/// <summary>A fenced block of a page.</summary>
/// <param name="Info">The words behind the opening fence.</param>
/// <param name="Text">The lines between the fences, each ended.</param>
/// <param name="FirstLine">The index of the first line between the fences.</param>
/// <param name="LineCount">The number of lines between the fences.</param>
/// <param name="Heading">The last heading above it.</param>
internal sealed record MarkdownBlock(string Info, string Text, int FirstLine, int LineCount, string Heading)
{
    /// <summary>The blocks of a page, in order.</summary>
    public static IReadOnlyList<MarkdownBlock> Read(string page)
    {
        var lines = page.Split('\n');
        var blocks = new List<MarkdownBlock>();
        var heading = "";
        for (var i = 0; i < lines.Length; i++)
        {
            if (lines[i].StartsWith('#'))
            {
                heading = lines[i].TrimStart('#').Trim();
            }

            if (!lines[i].StartsWith("```", StringComparison.Ordinal))
            {
                continue;
            }

            var first = i + 1;
            var end = Array.IndexOf(lines, "```", first);
            Assert.True(end > 0, $"a block that begins with '{lines[i]}' is not closed");
            var text = string.Concat(lines[first..end].Select(line => line + "\n"));
            blocks.Add(new MarkdownBlock(lines[i][3..].Trim(), text, first, end - first, heading));
            i = end;
        }

        return blocks;
    }
}
