using System.Globalization;
using System.Text.Json;

namespace ChainSolve.Reports;

/// <summary>A transition matrix as text, JSON and comma-separated values.</summary>
internal static class MatrixReport
{
    private const int Digits = 8;

    public static void WriteText(StateMatrix matrix, TextWriter writer)
    {
        var count = matrix.States.Count;
        var numbers = Enumerable.Range(1, count).Select(i => i.ToString(CultureInfo.InvariantCulture)).ToArray();
        var numberWidth = numbers[^1].Length;
        writer.Write($"P(t) at {NumberText.Time(matrix.Time, matrix.Model)}: from the state of the row to the state of the column\n\n");
        for (var i = 0; i < count; i++)
        {
            writer.Write($"  {numbers[i].PadLeft(numberWidth)}  {matrix.States[i]}\n");
        }

        var cells = Rows(matrix, e => NumberText.Earned(e.Value, e.Bound, Digits));
        var widths = Enumerable.Range(0, count).Select(j => cells.Max(row => row[j].Length)).Select(w => Math.Max(w, numberWidth)).ToArray();
        writer.Write('\n');
        WriteRow(writer, new string(' ', numberWidth), numbers, widths);
        for (var i = 0; i < count; i++)
        {
            WriteRow(writer, numbers[i].PadLeft(numberWidth), cells[i], widths);
        }

        writer.Write($"\nno error above {NumberText.Bound(Rows(matrix, e => e.Bound).Max(row => row.Max()))}\n");
    }

    public static void WriteCsv(StateMatrix matrix, TextWriter writer)
    {
        CsvText.Head(writer, matrix.Model, null);
        CsvText.Line(writer, CsvText.Named("time", matrix.Model.TimeUnit), "from", "to", "probability", "error bound");
        for (var i = 0; i < matrix.States.Count; i++)
        {
            for (var j = 0; j < matrix.States.Count; j++)
            {
                var chance = matrix[i, j];
                CsvText.Line(
                    writer, NumberText.Full(matrix.Time), matrix.States[i], matrix.States[j], NumberText.Full(chance.Value), NumberText.Full(chance.Bound));
            }
        }
    }

    public static void WriteJson(StateMatrix matrix, TextWriter writer) => JsonDocumentWriter.Write(writer, json =>
    {
        JsonDocumentWriter.WriteModel(json, matrix.Model);
        JsonDocumentWriter.WriteGivens(json, matrix.Model);
        json.WriteNumber("time", matrix.Time);
        json.WriteStartArray("states");
        foreach (var state in matrix.States)
        {
            json.WriteStringValue(state);
        }

        json.WriteEndArray();
        WriteRows(json, "probabilities", Rows(matrix, e => e.Value));
        WriteRows(json, "errorBounds", Rows(matrix, e => e.Bound));
    });

    private static T[][] Rows<T>(StateMatrix matrix, Func<Numerics.Estimates.Estimate, T> cell)
    {
        var states = Enumerable.Range(0, matrix.States.Count).ToArray();
        return Array.ConvertAll(states, i => Array.ConvertAll(states, j => cell(matrix[i, j])));
    }

    private static void WriteRow(TextWriter writer, string head, string[] cells, int[] widths) =>
        writer.Write($"  {head}  {string.Join("  ", cells.Select((cell, j) => cell.PadRight(widths[j])))}".TrimEnd() + "\n");

    private static void WriteRows(Utf8JsonWriter json, string name, double[][] rows)
    {
        json.WriteStartArray(name);
        foreach (var row in rows)
        {
            json.WriteStartArray();
            Array.ForEach(row, json.WriteNumberValue);
            json.WriteEndArray();
        }

        json.WriteEndArray();
    }
}
