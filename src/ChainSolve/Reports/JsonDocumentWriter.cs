using System.Text;
using System.Text.Encodings.Web;
using System.Text.Json;
using ChainSolve.Language.Diagnostics;

namespace ChainSolve.Reports;

/// <summary>What JSON documents have in common.</summary>
internal static class JsonDocumentWriter
{
    private static readonly JsonWriterOptions Options = new() { Indented = true, NewLine = "\n", Encoder = JavaScriptEncoder.UnsafeRelaxedJsonEscaping };

    /// <summary>Writes one document and a line end.</summary>
    public static void Write(TextWriter writer, Action<Utf8JsonWriter> write)
    {
        using var buffer = new MemoryStream();
        using (var json = new Utf8JsonWriter(buffer, Options))
        {
            json.WriteStartObject();
            json.WriteNumber("schemaVersion", 1);
            write(json);
            json.WriteEndObject();
        }

        writer.Write(Encoding.UTF8.GetString(buffer.GetBuffer(), 0, (int)buffer.Length));
        writer.Write('\n');
    }

    /// <summary>What a document says of its model.</summary>
    public static void WriteModel(Utf8JsonWriter json, Model model)
    {
        json.WriteString("model", model.Title);
        json.WriteString("file", model.Name);
        json.WriteString("timebase", model.TimeUnit);
    }

    public static void WriteGivens(Utf8JsonWriter json, Model model)
    {
        json.WriteStartArray("givens");
        foreach (var given in model.Givens)
        {
            json.WriteStartObject();
            json.WriteString("name", given.Name);
            json.WriteNumber("value", given.Value);
            json.WriteString("unit", given.Unit);
            json.WriteEndObject();
        }

        json.WriteEndArray();
    }

    public static void WriteDiagnostics(Utf8JsonWriter json, string name, IEnumerable<Diagnostic> diagnostics)
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

    /// <summary>A number, or the word <c>Infinity</c>.</summary>
    public static void WriteValue(Utf8JsonWriter json, string name, double value)
    {
        if (double.IsInfinity(value))
        {
            json.WriteString(name, value > 0 ? "Infinity" : "-Infinity");
        }
        else
        {
            json.WriteNumber(name, value);
        }
    }
}
