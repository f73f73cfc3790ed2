using System.Reflection;

namespace ChainSolve.Reports;

/// <summary>Results as comma-separated values: a line for each value.</summary>
internal static class SolutionCsv
{
    public static void Write(Solution solution, TextWriter writer, string? command)
    {
        WriteRemarks(solution.Model, writer, command);
        CsvText.Line(writer, "measure", "kind", CsvText.Head("time", solution.Model.TimeUnit), "value", "unit", "error bound", "status", "reason");
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

    private static void WriteRemarks(Model model, TextWriter writer, string? command)
    {
        CsvText.Remark(writer, $"model: {model.Title ?? model.Name}");
        CsvText.Remark(writer, $"file: {model.Name}, sha256 {model.Fingerprint}");
        foreach (var given in model.Givens)
        {
            CsvText.Remark(writer, $"given: {given.Name} = {NumberText.Full(given.Value)}{(given.Unit.Length == 0 ? "" : " ")}{given.Unit}");
        }

        CsvText.Remark(writer, $"version: {Version}");
        if (command is not null)
        {
            CsvText.Remark(writer, $"command: {command}");
        }
    }

    private static string Value(double value) => double.IsInfinity(value) ? (value > 0 ? "Infinity" : "-Infinity") : NumberText.Full(value);

    // What follows a plus tells the build, which does not belong into a record that has to compare equal.
    private static string Version =>
        typeof(SolutionCsv).Assembly.GetCustomAttribute<AssemblyInformationalVersionAttribute>()!.InformationalVersion.Split('+')[0];
}
