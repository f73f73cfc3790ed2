using System.Globalization;

namespace ChainSolve.Reports;

/// <summary>The most likely states as text, JSON and comma-separated values.</summary>
internal static class LikelyReport
{
    private const int Digits = 8;

    public static void WriteText(LikelyStates likely, TextWriter writer)
    {
        writer.Write($"the most likely states {(likely.Time is { } time ? $"at {NumberText.Time(time, likely.Model)}" : "in the long run")}\n\n");
        var cells = likely.States.Select(s => NumberText.Earned(s.Probability, s.ErrorBound, Digits)).ToArray();
        var width = cells.Max(c => c.Length);
        for (var i = 0; i < cells.Length; i++)
        {
            writer.Write($"  {cells[i].PadRight(width)}  {likely.States[i].Description}\n");
        }

        var rest = likely.StateCount - likely.States.Count;
        if (rest > 0)
        {
            var together = likely.States.Sum(s => s.Probability).ToString("0.########", CultureInfo.InvariantCulture);
            writer.Write($"\ntogether {together}; {NumberText.Count(rest)} further state{(rest == 1 ? "" : "s")}\n");
        }
    }

    public static void WriteCsv(LikelyStates likely, TextWriter writer)
    {
        CsvText.Head(writer, likely.Model, null);
        CsvText.Line(writer, CsvText.Named("time", likely.Model.TimeUnit), "state", "probability", "error bound");
        var time = likely.Time is { } t ? NumberText.Full(t) : "steady";
        foreach (var state in likely.States)
        {
            CsvText.Line(writer, time, state.Description, NumberText.Full(state.Probability), NumberText.Full(state.ErrorBound));
        }
    }

    public static void WriteJson(LikelyStates likely, TextWriter writer) => JsonDocumentWriter.Write(writer, json =>
    {
        JsonDocumentWriter.WriteModel(json, likely.Model);
        JsonDocumentWriter.WriteGivens(json, likely.Model);
        if (likely.Time is { } time)
        {
            json.WriteNumber("time", time);
        }
        else
        {
            json.WriteNull("time");
        }

        json.WriteNumber("stateCount", likely.StateCount);
        json.WriteString("method", likely.Method);
        json.WriteStartArray("states");
        foreach (var state in likely.States)
        {
            json.WriteStartObject();
            json.WriteString("state", state.Description);
            json.WriteNumber("probability", state.Probability);
            json.WriteNumber("errorBound", state.ErrorBound);
            json.WriteEndObject();
        }

        json.WriteEndArray();
    });
}
