using System.Globalization;

namespace ChainSolve.Cli.Answers;

/// <summary>Writes lines of comma-separated values (RFC 4180).</summary>
internal static class Csv
{
    public static string Line(IEnumerable<string> fields) => string.Join(',', fields.Select(Field));

    public static string Number(double value) => value.ToString("R", CultureInfo.InvariantCulture);

    private static string Field(string text) =>
        text.AsSpan().IndexOfAny(",\"\r\n") < 0 ? text : $"\"{text.Replace("\"", "\"\"", StringComparison.Ordinal)}\"";
}
