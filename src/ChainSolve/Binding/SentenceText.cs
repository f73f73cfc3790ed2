using System.Text;
using ChainSolve.Language.Syntax;
using ChainSolve.Language.Text;

namespace ChainSolve.Binding;

/// <summary>Measures as they are written, on one line and without comments.</summary>
internal sealed class SentenceText(SourceText source, IReadOnlyList<TextSpan> comments)
{
    /// <summary>The measure from its kind on.</summary>
    public string Of(MeasureSyntax measure)
    {
        var text = new StringBuilder();
        var at = measure.Name.Span.End;
        foreach (var comment in comments)
        {
            if (comment.Start < at || comment.Start >= measure.Span.End)
            {
                continue;
            }

            text.Append(source.Content, at, comment.Start - at);
            at = comment.End;
        }

        text.Append(source.Content, at, Math.Max(0, measure.Span.End - at));
        var written = SourceWords.OneLine(text.ToString());
        return written.StartsWith('=') ? written[1..].TrimStart() : written;
    }
}
