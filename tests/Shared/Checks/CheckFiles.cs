using System.Text.Json;

namespace ChainSolve.Tests.Shared.Checks;

/// <summary>Reads the files of checks that lie beside the test assembly.</summary>
internal static class CheckFiles
{
    private static readonly JsonSerializerOptions Options = new(JsonSerializerDefaults.Web)
    {
        UnmappedMemberHandling = System.Text.Json.Serialization.JsonUnmappedMemberHandling.Disallow,
    };

    private static readonly Lazy<IReadOnlyDictionary<string, CheckCase>> Cases = new(Load);

    public static IEnumerable<CheckCase> All => Cases.Value.Values;

    public static CheckCase Find(string id) => Cases.Value[id];

    private static Dictionary<string, CheckCase> Load()
    {
        var cases = new Dictionary<string, CheckCase>(StringComparer.Ordinal);
        var folder = Path.Combine(AppContext.BaseDirectory, "checks");
        foreach (var path in Directory.EnumerateFiles(folder, "*.json").Order(StringComparer.Ordinal))
        {
            var file = JsonSerializer.Deserialize<CheckFile>(File.ReadAllText(path), Options)
                ?? throw new InvalidDataException($"{path} is empty.");
            foreach (var item in file.Cases)
            {
                cases.Add(item.Id, item);
            }
        }

        return cases;
    }

    private sealed record CheckFile(CheckCase[] Cases);
}
