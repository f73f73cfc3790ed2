using System.Text;
using ChainSolve.Language.Text;

namespace ChainSolve.Binding;

/// <summary>Cuts parts of a text for messages.</summary>
internal static class SourceWords
{
    private const int Longest = 40;

    /// <summary>A part of the text on one line, quoted, shortened in the middle where it is long.</summary>
    public static string Quote(SourceText source, TextSpan span)
    {
        var text = OneLine(source.Slice(span));
        if (text.Length > Longest)
        {
            text = $"{text[..(Longest / 2)]}…{text[^(Longest / 4)..]}";
        }

        return $"'{text}'";
    }

    /// <summary>A text with every run of white space as one blank.</summary>
    public static string OneLine(string text)
    {
        var line = new StringBuilder(text.Length);
        foreach (var c in text.Trim())
        {
            if (!char.IsWhiteSpace(c))
            {
                line.Append(c);
            }
            else if (line[^1] != ' ')
            {
                line.Append(' ');
            }
        }

        return line.ToString();
    }
}
