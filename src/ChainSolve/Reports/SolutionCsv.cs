namespace ChainSolve.Reports;

/// <summary>Results as comma-separated values: a line for each value.</summary>
internal static class SolutionCsv
{
    public static void Write(Solution solution, TextWriter writer, string? command)
    {
        CsvText.Head(writer, solution.Model, command);
        CsvText.Line(writer, "measure", "kind", CsvText.Named("time", solution.Model.TimeUnit), "value", "unit", "error bound", "status", "reason");
        foreach (var measure in solution.Measures)
        {
            if (measure.Points.Count == 0)
            {
                CsvText.Line(writer, measure.Name, measure.Kind, "", "", measure.Unit, "", SolutionJson.Word(measure.Status), measure.Reason ?? "");
            }

            foreach (var point in measure.Points)
            {
                CsvText.Line(
                    writer,
                    measure.Name,
                    measure.Kind,
                    point.Time is { } time ? NumberText.Full(time) : "",
                    Value(point.Value),
                    measure.Unit,
                    NumberText.Full(point.ErrorBound),
                    SolutionJson.Word(point.Status),
                    point.Reason ?? "");
            }
        }
    }

    private static string Value(double value) => double.IsInfinity(value) ? (value > 0 ? "Infinity" : "-Infinity") : NumberText.Full(value);
}
