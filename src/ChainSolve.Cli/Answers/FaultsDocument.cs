using System.Text.Json;
using ChainSolve.Language.Diagnostics;

namespace ChainSolve.Cli.Answers;

/// <summary>Faults and warnings as a JSON document.</summary>
internal static class FaultsDocument
{
    /// <summary>Writes the document.</summary>
    /// <param name="writer">Where to.</param>
    /// <param name="file">The model's file.</param>
    /// <param name="diagnostics">Faults and warnings, in the order of the text.</param>
    public static void Write(TextWriter writer, string file, IReadOnlyList<Diagnostic> diagnostics) => JsonText.Write(writer, json =>
    {
        json.WriteStartObject();
        json.WriteNumber("schemaVersion", 1);
        json.WriteString("file", file);
        WriteList(json, "faults", diagnostics.Where(d => d.Severity == Severity.Fault));
        WriteList(json, "warnings", diagnostics.Where(d => d.Severity == Severity.Warning));
        json.WriteEndObject();
    });

    private static void WriteList(Utf8JsonWriter json, string name, IEnumerable<Diagnostic> diagnostics)
    {
        json.WriteStartArray(name);
        foreach (var diagnostic in diagnostics)
        {
            json.WriteStartObject();
            json.WriteString("code", diagnostic.Code);
            json.WriteString("message", diagnostic.Message);
            json.WriteNumber("line", diagnostic.Position.Line);
            json.WriteNumber("column", diagnostic.Position.Column);
            json.WriteEndObject();
        }

        json.WriteEndArray();
    }
}
