using System.Globalization;

namespace ChainSolve.Cli.Answers;

/// <summary>The chances of being in each state after some time, by the state one starts from.</summary>
internal sealed record MatrixAnswer
{
    /// <summary>The model's title or file.</summary>
    public required string Model { get; init; }

    /// <summary>The time in the model's unit.</summary>
    public required double Time { get; init; }

    /// <summary>The model's unit of time; empty for a model without units.</summary>
    public required string Unit { get; init; }

    /// <summary>The states in the model's own words.</summary>
    public required IReadOnlyList<string> States { get; init; }

    /// <summary>The chances, by start and then by end.</summary>
    public required IReadOnlyList<IReadOnlyList<double>> Chances { get; init; }

    /// <summary>A bound on the error of each chance.</summary>
    public required IReadOnlyList<IReadOnlyList<double>> Bounds { get; init; }

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
        var time = Time.ToString("R", CultureInfo.InvariantCulture) + (Unit.Length > 0 ? " " + Unit : "");
        writer.Write($"P(t) at {time}: from the state of the row to the state of the column\n\n");
        var numberWidth = States.Count.ToString(CultureInfo.InvariantCulture).Length;
        for (var i = 0; i < States.Count; i++)
        {
            writer.Write($"  {(i + 1).ToString(CultureInfo.InvariantCulture).PadLeft(numberWidth)}  {States[i]}\n");
        }

        var cells = Chances.Select((row, i) => row.Select((p, j) => EarnedDigits.Format(p, Bounds[i][j], 8)).ToArray()).ToArray();
        var widths = Enumerable.Range(0, States.Count).Select(j => Math.Max(numberWidth, cells.Max(row => row[j].Length))).ToArray();
        writer.Write('\n');
        WriteRow(writer, new string(' ', numberWidth), [.. Enumerable.Range(1, States.Count).Select(j => j.ToString(CultureInfo.InvariantCulture))], widths);
        for (var i = 0; i < cells.Length; i++)
        {
            WriteRow(writer, (i + 1).ToString(CultureInfo.InvariantCulture).PadLeft(numberWidth), cells[i], widths);
        }

        var worst = Bounds.Max(row => row.Max());
        writer.Write(string.Create(CultureInfo.InvariantCulture, $"\nno error above {worst:0.0e-0}\n"));
    }

    private static void WriteRow(TextWriter writer, string head, string[] cells, int[] widths)
    {
        writer.Write($"  {head}  {string.Join("  ", cells.Select((cell, j) => cell.PadRight(widths[j])))}".TrimEnd());
        writer.Write('\n');
    }

    private void WriteCsv(TextWriter writer)
    {
        var unit = Unit.Length > 0 ? $" [{Unit}]" : "";
        writer.Write($"# {Model}\n");
        writer.Write(Csv.Line([$"time{unit}", "from", "to", "probability", "error bound"]) + "\n");
        for (var i = 0; i < States.Count; i++)
        {
            for (var j = 0; j < States.Count; j++)
            {
                writer.Write(Csv.Line([Csv.Number(Time), States[i], States[j], Csv.Number(Chances[i][j]), Csv.Number(Bounds[i][j])]) + "\n");
            }
        }
    }

    private void WriteJson(TextWriter writer) => JsonText.Write(writer, json =>
    {
        json.WriteStartObject();
        json.WriteNumber("schemaVersion", 1);
        json.WriteString("model", Model);
        json.WriteString("timebase", Unit);
        json.WriteNumber("time", Time);
        json.WriteStartArray("states");
        foreach (var state in States)
        {
            json.WriteStringValue(state);
        }

        json.WriteEndArray();
        WriteRows(json, "probabilities", Chances);
        WriteRows(json, "errorBounds", Bounds);
        json.WriteEndObject();
    });

    private static void WriteRows(System.Text.Json.Utf8JsonWriter json, string name, IReadOnlyList<IReadOnlyList<double>> rows)
    {
        json.WriteStartArray(name);
        foreach (var row in rows)
        {
            json.WriteStartArray();
            foreach (var value in row)
            {
                json.WriteNumberValue(value);
            }

            json.WriteEndArray();
        }

        json.WriteEndArray();
    }
}
