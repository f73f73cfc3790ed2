using ChainSolve.Numerics.Estimates;

namespace ChainSolve.Reports;

/// <summary>Results as text: a block for each measure, and a closing line.</summary>
internal static class SolutionText
{
    private const string Indent = "    ";

    public static void Write(Solution solution, TextWriter writer)
    {
        foreach (var measure in solution.Measures)
        {
            WriteMeasure(measure, solution.Model.TimeUnit, writer);
            writer.Write('\n');
        }

        writer.Write(
            $"{Sizes(solution.StateCount, solution.TransitionCount)}, {NumberText.Seconds(solution.Elapsed)}\n");
    }

    /// <summary>Numbers of states and transitions.</summary>
    public static string Sizes(long states, long transitions) =>
        $"{NumberText.Count(states)} {(states == 1 ? "state" : "states")}, {NumberText.Count(transitions)} {(transitions == 1 ? "transition" : "transitions")}";

    private static void WriteMeasure(MeasureResult measure, string timeUnit, TextWriter writer)
    {
        writer.Write($"{measure.Name} = {measure.Sentence}\n");
        if (measure.Status == SolveStatus.Failed)
        {
            writer.Write($"{Indent}no value: {measure.Reason}\n");
        }

        var times = Columns.Align([.. measure.Points.Select(p => p.Time is { } t ? TimeText(t, measure, timeUnit) : "")]);
        var values = Columns.Align([.. measure.Points.Select(p => ValueText(p, measure.Unit))]);
        for (var i = 0; i < measure.Points.Count; i++)
        {
            var point = measure.Points[i];
            var time = times[i].Length == 0 ? "" : times[i] + "  ";
            writer.Write($"{Indent}{time}{values[i]}  {BoundText(point)}".TrimEnd() + "\n");
        }

        foreach (var reason in measure.Points.Select(p => p.Reason).OfType<string>().Distinct())
        {
            writer.Write($"{Indent}infinite, because {reason}\n");
        }

        if (measure.Status == SolveStatus.Short)
        {
            writer.Write($"{Indent}short: {measure.Reason}\n");
        }

        WriteMethod(measure, writer);
    }

    private static void WriteMethod(MeasureResult measure, TextWriter writer)
    {
        if (measure.Method == "none")
        {
            writer.Write(measure.Status == SolveStatus.Failed ? "" : $"{Indent}{measure.How}\n");
            return;
        }

        writer.Write($"{Indent}by {measure.Method} ({measure.Why})\n");
        if (measure.How.Length > 0)
        {
            writer.Write($"{Indent}{measure.How}\n");
        }
    }

    private static string ValueText(MeasurePoint point, string unit)
    {
        var number = NumberText.Earned(point.Value, point.ErrorBound);
        return unit.Length == 0 || double.IsInfinity(point.Value) ? number : $"{number} {unit}";
    }

    private static string BoundText(MeasurePoint point)
    {
        if (double.IsInfinity(point.Value))
        {
            return "";
        }

        var bound = point.ErrorBound == 0 ? "exact" : $"± {NumberText.Bound(point.ErrorBound)}";
        return point.IsProved ? bound : $"{bound} (estimated)";
    }

    private static string TimeText(double time, MeasureResult measure, string timeUnit)
    {
        var unit = measure.TimesUnit.Text.Length > 0 ? measure.TimesUnit.Text : timeUnit;
        var number = NumberText.Written(time / measure.TimesUnit.Factor);
        return unit.Length == 0 ? number : $"{number} {unit}";
    }
}
