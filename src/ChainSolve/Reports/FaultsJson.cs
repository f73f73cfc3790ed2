using ChainSolve.Language.Diagnostics;

namespace ChainSolve.Reports;

/// <summary>Faults and warnings of a text as a JSON document: that of results without measures.</summary>
internal static class FaultsJson
{
    public static void Write(IReadOnlyList<Diagnostic> diagnostics, string file, TextWriter writer) => JsonDocumentWriter.Write(writer, json =>
    {
        json.WriteString("file", file);
        JsonDocumentWriter.WriteDiagnostics(json, "faults", diagnostics.Where(d => d.Severity == Severity.Fault));
        JsonDocumentWriter.WriteDiagnostics(json, "warnings", diagnostics.Where(d => d.Severity == Severity.Warning));
    });
}
