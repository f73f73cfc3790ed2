namespace ChainSolve.Reports;

/// <summary>Puts numbers under each other by their decimal points.</summary>
internal static class Columns
{
    /// <summary>The texts, padded on both sides to one width; those that are no numbers begin where numbers begin.</summary>
    public static string[] Align(IReadOnlyList<string> texts)
    {
        var heads = texts.Select(PointOf).ToArray();
        var head = heads.DefaultIfEmpty(0).Max();
        var shifted = texts.Select((t, i) => new string(' ', head - heads[i]) + t).ToArray();
        var width = shifted.Select(t => t.Length).DefaultIfEmpty(0).Max();
        return Array.ConvertAll(shifted, t => t.PadRight(width));
    }

    private static int PointOf(string text)
    {
        var end = text.AsSpan().IndexOfAny(".e ");
        return text.Length > 0 && (char.IsAsciiDigit(text[0]) || text[0] == '-') ? (end < 0 ? text.Length : end) : 0;
    }
}
