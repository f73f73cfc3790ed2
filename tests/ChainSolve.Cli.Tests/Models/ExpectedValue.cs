using System.Globalization;
using System.Text.Json;

namespace ChainSolve.Cli.Tests.Models;

/// <summary>A number that a sample model has to give, from outside.</summary>
internal sealed record ExpectedValue(string Measure, double? Time, double Value, double Tolerance)
{
    /// <summary>Reads the file beside a model.</summary>
    public static (int States, IReadOnlyList<ExpectedValue> Values) Read(string json)
    {
        using var document = JsonDocument.Parse(json);
        var root = document.RootElement;
        var usual = Number(root.GetProperty("tolerance"));
        var values = root.GetProperty("values").EnumerateArray().Select(entry => new ExpectedValue(
            entry.GetProperty("measure").GetString()!,
            entry.GetProperty("time").ValueKind == JsonValueKind.Null ? null : Number(entry.GetProperty("time")),
            Number(entry.GetProperty("value")),
            entry.TryGetProperty("tolerance", out var own) ? Number(own) : usual));
        return (root.GetProperty("states").GetInt32(), [.. values]);
    }

    private static double Number(JsonElement text) => double.Parse(text.GetString()!, CultureInfo.InvariantCulture);
}
