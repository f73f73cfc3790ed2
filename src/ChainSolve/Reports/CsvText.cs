namespace ChainSolve.Reports;

/// <summary>Writes lines of comma-separated values (RFC 4180), with lines of remarks before them.</summary>
internal static class CsvText
{
    public static void Remark(TextWriter writer, string text) =>
        writer.Write($"# {text.ReplaceLineEndings(" ")}\n");

    public static void Line(TextWriter writer, params IEnumerable<string> fields) =>
        writer.Write(string.Join(',', fields.Select(Field)) + "\n");

    /// <summary>A name with its unit in brackets.</summary>
    public static string Head(string name, string unit) => unit.Length == 0 ? name : $"{name} [{unit}]";

    private static string Field(string text) =>
        text.AsSpan().IndexOfAny(",\"\r\n") < 0 ? text : $"\"{text.Replace("\"", "\"\"", StringComparison.Ordinal)}\"";
}
