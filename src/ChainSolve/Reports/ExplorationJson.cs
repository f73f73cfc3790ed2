namespace ChainSolve.Reports;

/// <summary>What exploring found, as a JSON document.</summary>
internal static class ExplorationJson
{
    public static void Write(Exploration found, TextWriter writer) => JsonDocumentWriter.Write(writer, json =>
    {
        JsonDocumentWriter.WriteModel(json, found.Model);
        json.WriteNumber("states", found.StateCount);
        json.WriteNumber("transitions", found.TransitionCount);
        json.WriteNumber("recurrentClasses", found.RecurrentClassCount);
        json.WriteNumber("transientStates", found.TransientStateCount);
        json.WriteNumber("absorbingStates", found.AbsorbingStateCount);
        json.WriteNumber("largestExitRate", found.LargestExitRate);
        JsonDocumentWriter.WriteGivens(json, found.Model);
        JsonDocumentWriter.WriteDiagnostics(json, "warnings", found.Warnings);
        json.WriteNumber("elapsedSeconds", found.Elapsed.TotalSeconds);
    });
}
