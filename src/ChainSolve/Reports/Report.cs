using ChainSolve.Language.Diagnostics;

namespace ChainSolve.Reports;

/// <summary>Writes results. The output does not depend on the culture of the machine; lines end in a line feed.</summary>
/// <remarks>Safe to call from several threads on writers of their own.</remarks>
public static class Report
{
    /// <summary>Writes the results of a model.</summary>
    /// <param name="solution">The results.</param>
    /// <param name="format">The form.</param>
    /// <param name="writer">Where to; it is left open.</param>
    /// <param name="command">For comma-separated values: what the results were asked with, as a remark; null for no such line.</param>
    public static void Write(Solution solution, ReportFormat format, TextWriter writer, string? command = null)
    {
        ArgumentNullException.ThrowIfNull(solution);
        ArgumentNullException.ThrowIfNull(writer);
        Write(solution, format, writer, SolutionText.Write, SolutionJson.Write, (s, w) => SolutionCsv.Write(s, w, command));
    }

    /// <summary>Writes what exploring found, as text or JSON.</summary>
    /// <param name="exploration">What was found.</param>
    /// <param name="format">The form; not <see cref="ReportFormat.Csv"/>.</param>
    /// <param name="writer">Where to; it is left open.</param>
    /// <exception cref="ArgumentOutOfRangeException">The form is not one of both.</exception>
    public static void Write(Exploration exploration, ReportFormat format, TextWriter writer)
    {
        ArgumentNullException.ThrowIfNull(exploration);
        ArgumentNullException.ThrowIfNull(writer);
        Write(exploration, format, writer, ExplorationText.Write, ExplorationJson.Write, (_, _) => throw new ArgumentOutOfRangeException(
            nameof(format), format, "What exploring found is written as text or JSON."));
    }

    /// <summary>Writes a transition matrix.</summary>
    /// <param name="matrix">The matrix.</param>
    /// <param name="format">The form.</param>
    /// <param name="writer">Where to; it is left open.</param>
    public static void Write(StateMatrix matrix, ReportFormat format, TextWriter writer)
    {
        ArgumentNullException.ThrowIfNull(matrix);
        ArgumentNullException.ThrowIfNull(writer);
        Write(matrix, format, writer, MatrixReport.WriteText, MatrixReport.WriteJson, MatrixReport.WriteCsv);
    }

    /// <summary>Writes the most likely states.</summary>
    /// <param name="likely">The states.</param>
    /// <param name="format">The form.</param>
    /// <param name="writer">Where to; it is left open.</param>
    public static void Write(LikelyStates likely, ReportFormat format, TextWriter writer)
    {
        ArgumentNullException.ThrowIfNull(likely);
        ArgumentNullException.ThrowIfNull(writer);
        Write(likely, format, writer, LikelyReport.WriteText, LikelyReport.WriteJson, LikelyReport.WriteCsv);
    }

    /// <summary>Writes faults and warnings as a JSON document.</summary>
    /// <param name="diagnostics">The faults and warnings, in the order of the text.</param>
    /// <param name="file">The name of the file.</param>
    /// <param name="writer">Where to; it is left open.</param>
    public static void WriteFaults(IReadOnlyList<Diagnostic> diagnostics, string file, TextWriter writer)
    {
        ArgumentNullException.ThrowIfNull(diagnostics);
        ArgumentNullException.ThrowIfNull(file);
        ArgumentNullException.ThrowIfNull(writer);
        FaultsJson.Write(diagnostics, file, writer);
    }

    private static void Write<T>(
        T value, ReportFormat format, TextWriter writer, Action<T, TextWriter> text, Action<T, TextWriter> json, Action<T, TextWriter> csv)
    {
        var write = format switch
        {
            ReportFormat.Text => text,
            ReportFormat.Json => json,
            ReportFormat.Csv => csv,
            _ => throw new ArgumentOutOfRangeException(nameof(format), format, "Unknown form."),
        };
        write(value, writer);
    }
}
