using System.Text.Json;
using ChainSolve.Numerics.Estimates;

namespace ChainSolve.Reports;

/// <summary>Results as a JSON document; <c>docs/schema/solve.schema.json</c> describes it.</summary>
internal static class SolutionJson
{
    public static void Write(Solution solution, TextWriter writer) => JsonDocumentWriter.Write(writer, json =>
    {
        JsonDocumentWriter.WriteModel(json, solution.Model);
        json.WriteNumber("states", solution.StateCount);
        json.WriteNumber("transitions", solution.TransitionCount);
        JsonDocumentWriter.WriteGivens(json, solution.Model);
        json.WriteStartArray("measures");
        foreach (var measure in solution.Measures)
        {
            WriteMeasure(json, measure);
        }

        json.WriteEndArray();
        JsonDocumentWriter.WriteDiagnostics(json, "warnings", solution.Warnings);
        json.WriteNumber("elapsedSeconds", solution.Elapsed.TotalSeconds);
    });

    private static void WriteMeasure(Utf8JsonWriter json, MeasureResult measure)
    {
        json.WriteStartObject();
        json.WriteString("name", measure.Name);
        json.WriteString("kind", measure.Kind);
        json.WriteString("unit", measure.Unit);
        json.WriteString("method", measure.Method);
        json.WriteString("why", measure.Why);
        json.WriteString("status", Word(measure.Status));
        if (measure.Reason is not null)
        {
            json.WriteString("reason", measure.Reason);
        }

        json.WriteStartArray("points");
        foreach (var point in measure.Points)
        {
            WritePoint(json, point);
        }

        json.WriteEndArray();
        json.WriteEndObject();
    }

    private static void WritePoint(Utf8JsonWriter json, MeasurePoint point)
    {
        json.WriteStartObject();
        if (point.Time is { } time)
        {
            json.WriteNumber("time", time);
        }
        else
        {
            json.WriteNull("time");
        }

        JsonDocumentWriter.WriteValue(json, "value", point.Value);
        json.WriteNumber("errorBound", point.ErrorBound);
        if (!point.IsProved)
        {
            json.WriteBoolean("estimated", true);
        }

        if (point.Reason is not null)
        {
            json.WriteString("reason", point.Reason);
        }

        json.WriteEndObject();
    }

    /// <summary>A status as documents write it.</summary>
    public static string Word(SolveStatus status) => status switch
    {
        SolveStatus.Ok => "ok",
        SolveStatus.Short => "short",
        _ => "failed",
    };
}
