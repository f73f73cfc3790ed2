using System.Globalization;

namespace ChainSolve.Cli.Answers;

/// <summary>The most likely states at a time or in the long run.</summary>
internal sealed record LikelyAnswer
{
    /// <summary>The model's title or file.</summary>
    public required string Model { get; init; }

    /// <summary>The time in the model's unit; null for the long run.</summary>
    public required double? Time { get; init; }

    /// <summary>The model's unit of time; empty for a model without units.</summary>
    public required string Unit { get; init; }

    /// <summary>How many states the model has.</summary>
    public required int StateCount { get; init; }

    /// <summary>The states that are shown, the most likely first.</summary>
    public required IReadOnlyList<LikelyState> States { get; init; }

    /// <summary>Writes the answer as <c>text</c>, <c>json</c> or <c>csv</c>.</summary>
    public void Write(TextWriter writer, string format)
    {
        switch (format)
        {
            case "json":
                WriteJson(writer);
                break;
            case "csv":
                WriteCsv(writer);
                break;
            default:
                WriteText(writer);
                break;
        }
    }

    private void WriteText(TextWriter writer)
    {
        var when = Time is { } time
            ? $"at {time.ToString("R", CultureInfo.InvariantCulture)}{(Unit.Length > 0 ? " " + Unit : "")}"
            : "in the long run";
        writer.Write($"the most likely states {when}\n\n");
        var cells = States.Select(s => EarnedDigits.Format(s.Probability, s.ErrorBound, 8)).ToArray();
        var width = cells.Length == 0 ? 0 : cells.Max(c => c.Length);
        for (var i = 0; i < cells.Length; i++)
        {
            writer.Write($"  {cells[i].PadRight(width)}  {States[i].Description}\n");
        }

        var rest = StateCount - States.Count;
        var shown = States.Sum(s => s.Probability);
        if (rest > 0)
        {
            var share = shown.ToString("0.########", CultureInfo.InvariantCulture);
            writer.Write(string.Create(CultureInfo.InvariantCulture, $"\ntogether {share}; {rest:N0} further state{(rest == 1 ? "" : "s")}\n"));
        }
    }

    private void WriteCsv(TextWriter writer)
    {
        var unit = Unit.Length > 0 ? $" [{Unit}]" : "";
        writer.Write($"# {Model}\n");
        writer.Write(Csv.Line([$"time{unit}", "state", "probability", "error bound"]) + "\n");
        foreach (var state in States)
        {
            var time = Time is { } t ? Csv.Number(t) : "steady";
            writer.Write(Csv.Line([time, state.Description, Csv.Number(state.Probability), Csv.Number(state.ErrorBound)]) + "\n");
        }
    }

    private void WriteJson(TextWriter writer) => JsonText.Write(writer, json =>
    {
        json.WriteStartObject();
        json.WriteNumber("schemaVersion", 1);
        json.WriteString("model", Model);
        json.WriteString("timebase", Unit);
        if (Time is { } time)
        {
            json.WriteNumber("time", time);
        }
        else
        {
            json.WriteNull("time");
        }

        json.WriteNumber("stateCount", StateCount);
        json.WriteStartArray("states");
        foreach (var state in States)
        {
            json.WriteStartObject();
            json.WriteString("state", state.Description);
            json.WriteNumber("probability", state.Probability);
            json.WriteNumber("errorBound", state.ErrorBound);
            json.WriteEndObject();
        }

        json.WriteEndArray();
        json.WriteEndObject();
    });
}
