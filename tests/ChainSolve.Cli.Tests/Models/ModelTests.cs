using System.Text.Json;
using ChainSolve.Cli.Commands;
using ChainSolve.Cli.Tests.Support;
using ChainSolve.Tests.Shared.Files;

namespace ChainSolve.Cli.Tests.Models;

/// <summary>Every sample model gives the numbers in the file beside it; their sources stand there.</summary>
public class ModelTests
{
    public static TheoryData<string> Names() =>
        new(Directory.GetFiles(Repository.PathOf("models"), "*.chain").Select(Path.GetFileNameWithoutExtension).Order(StringComparer.Ordinal)!);

    [Fact]
    public void Names_InTheFolder_AreAtLeastSix()
    {
        Assert.True(Names().Count >= 6);
    }

    [Theory]
    [MemberData(nameof(Names))]
    public async Task Solve_SampleModel_GivesTheNumbersFromOutside(string name)
    {
        var (states, expected) = ExpectedValue.Read(Repository.Read("models", name + ".expected.json"));

        var outcome = await InProcess.RunAsync("solve", Repository.PathOf("models", name + ".chain"), "--format", "json");

        Assert.True(outcome.ExitCode == ExitCodes.Done, outcome.Error);
        using var document = JsonDocument.Parse(outcome.Answer);
        Assert.Equal(states, document.RootElement.GetProperty("states").GetInt32());
        var points = Points(document.RootElement);
        Assert.Equal(points.Count, expected.Count);
        var wrong = expected.Select(value => Compare(value, points)).OfType<string>().ToList();
        Assert.True(wrong.Count == 0, string.Join("\n", wrong));
    }

    private static string? Compare(ExpectedValue expected, List<(string Measure, double? Time, double Value, double Bound)> points)
    {
        var found = points.Where(p => p.Measure == expected.Measure && SameTime(p.Time, expected.Time)).ToList();
        if (found.Count != 1)
        {
            return $"{expected.Measure} at {expected.Time}: {found.Count} values";
        }

        var point = found[0];
        var error = Math.Abs(point.Value - expected.Value);
        var size = Math.Abs(expected.Value);
        if (error > expected.Tolerance * size)
        {
            return $"{expected.Measure} at {expected.Time}: {point.Value:R}, expected {expected.Value:R}, relative error {error / size:e1}";
        }

        // The number from outside belongs to the exact decimals of the model, while rates are the doubles next to them; it is itself rounded to a
        // double, or computed with its own tolerance.
        var slack = (expected.Tolerance > 1e-12 ? expected.Tolerance : 2e-15) * size;
        return error <= point.Bound + slack ? null : $"{expected.Measure} at {expected.Time}: error {error:e2} is beyond the bound {point.Bound:e2}";
    }

    private static bool SameTime(double? one, double? other) =>
        one is null || other is null ? one is null && other is null : Math.Abs(one.Value - other.Value) <= 1e-12 * Math.Abs(other.Value);

    private static List<(string Measure, double? Time, double Value, double Bound)> Points(JsonElement root) =>
        [.. root.GetProperty("measures").EnumerateArray().SelectMany(measure => measure.GetProperty("points").EnumerateArray().Select(point => (
            measure.GetProperty("name").GetString()!,
            point.GetProperty("time").ValueKind == JsonValueKind.Null ? (double?)null : point.GetProperty("time").GetDouble(),
            point.GetProperty("value").GetDouble(),
            point.GetProperty("errorBound").GetDouble())))];
}
