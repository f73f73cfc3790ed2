namespace ChainSolve.Language.Text;

/// <summary>A half-open range of UTF-16 code units in a <see cref="SourceText"/>.</summary>
/// <param name="Start">Offset of the first code unit, from 0.</param>
/// <param name="Length">Number of code units; 0 marks a place between two characters.</param>
public readonly record struct TextSpan(int Start, int Length)
{
    /// <summary>Offset just behind the last code unit.</summary>
    public int End => Start + Length;

    /// <summary>The smallest span that holds both spans.</summary>
    public static TextSpan Cover(TextSpan first, TextSpan second)
    {
        var start = Math.Min(first.Start, second.Start);
        return new TextSpan(start, Math.Max(first.End, second.End) - start);
    }
}
