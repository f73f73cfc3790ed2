using System.Text;
using System.Text.Encodings.Web;
using System.Text.Json;

namespace ChainSolve.Cli.Answers;

/// <summary>Writes JSON documents with line breaks.</summary>
internal static class JsonText
{
    private static readonly JsonWriterOptions Options = new() { Indented = true, NewLine = "\n", Encoder = JavaScriptEncoder.UnsafeRelaxedJsonEscaping };

    public static void Write(TextWriter writer, Action<Utf8JsonWriter> write)
    {
        using var buffer = new MemoryStream();
        using (var json = new Utf8JsonWriter(buffer, Options))
        {
            write(json);
        }

        writer.Write(Encoding.UTF8.GetString(buffer.GetBuffer(), 0, (int)buffer.Length));
        writer.Write('\n');
    }
}
