using System.Text.Json;
using ChainSolve.Reports;

namespace ChainSolve.Tests.Reports;

/// <summary>Whole outputs of the matrix of a time and of the most likely states.</summary>
public class StateReportTests
{
    // Rates that are powers of two, and times at which nothing or everything has happened: the numbers are exact in any arithmetic.
    private static readonly Model Unit = Model.Parse("""
        model "Unit, \"old\""
        given l = 3 per h
        item unit { up -> down at l; down -> up at 1 per h }
        """);

    private static readonly Model Pair = Model.Parse("item unit x 2 { up -> down at 1; down -> up at 1 }");

    [Fact]
    public void Write_Matrix_WholeText() =>
        Assert.Equal(
            """
            P(t) at 1000 h: from the state of the row to the state of the column

              1  unit: up
              2  unit: down

                 1     2
              1  0.25  0.75
              2  0.25  0.75

            no error above BOUND

            """,
            Written(w => Report.Write(Unit.TransitionMatrix(1000), ReportFormat.Text, w), "no error above ", "BOUND"));

    [Fact]
    public void Write_MatrixAtTheStart_WholeCsv() =>
        Assert.Equal(
            $"""
            # model: Unit, "old"
            # file: model, sha256 {Unit.Fingerprint}
            # given: l = 3 per h
            # version: 0.1.0
            time [h],from,to,probability,error bound
            0,unit: up,unit: up,1,0
            0,unit: up,unit: down,0,0
            0,unit: down,unit: up,0,0
            0,unit: down,unit: down,1,0

            """,
            Written(w => Report.Write(Unit.TransitionMatrix(0), ReportFormat.Csv, w)));

    [Fact]
    public void Write_Matrix_JsonHasRows()
    {
        using var document = JsonDocument.Parse(Written(w => Report.Write(Unit.TransitionMatrix(1000), ReportFormat.Json, w)));
        var root = document.RootElement;
        Assert.Equal(
            ["schemaVersion", "model", "file", "timebase", "givens", "time", "states", "probabilities", "errorBounds"],
            root.EnumerateObject().Select(p => p.Name));
        Assert.Equal(0.75, root.GetProperty("probabilities")[0][1].GetDouble(), 1e-15);
        Assert.InRange(root.GetProperty("errorBounds")[1][0].GetDouble(), 0, 1e-15);
    }

    [Fact]
    public void Write_LikelyStatesOfTheLongRun_WholeText() =>
        Assert.Equal(
            """
            the most likely states in the long run

              0.5   unit: up 1, down 1
              0.25  unit: down 2

            together 0.75; 1 further state

            """,
            Written(w => Report.Write(Pair.LikelyStates(null, 2), ReportFormat.Text, w)));

    [Fact]
    public void Write_LikelyStatesAtTheStart_WholeTextAndCsv()
    {
        var likely = Pair.LikelyStates(0, 1);
        Assert.Equal(
            """
            the most likely states at 0

              1  unit: up 2

            together 1; 2 further states

            """,
            Written(w => Report.Write(likely, ReportFormat.Text, w)));
        Assert.EndsWith("time,state,probability,error bound\n0,unit: up 2,1,0\n", Written(w => Report.Write(likely, ReportFormat.Csv, w)), StringComparison.Ordinal);
        Assert.Contains("\nsteady,\"unit: up 1, down 1\",0.5,", Written(w => Report.Write(Pair.LikelyStates(null), ReportFormat.Csv, w)), StringComparison.Ordinal);
    }

    [Fact]
    public void Write_LikelyStates_JsonHasTheMethod()
    {
        using var document = JsonDocument.Parse(Written(w => Report.Write(Pair.LikelyStates(null), ReportFormat.Json, w)));
        Assert.Equal(JsonValueKind.Null, document.RootElement.GetProperty("time").ValueKind);
        Assert.Equal("gth", document.RootElement.GetProperty("method").GetString());
        Assert.Equal(["unit: up 1, down 1", "unit: down 2", "unit: up 2"], document.RootElement.GetProperty("states").EnumerateArray().Select(s => s.GetProperty("state").GetString()));
    }

    /// <summary>What is written; a number that varies with the rounding of the machine is replaced.</summary>
    private static string Written(Action<TextWriter> write, string? before = null, string? mark = null)
    {
        using var writer = new StringWriter();
        write(writer);
        var text = writer.ToString();
        if (before is null)
        {
            return text;
        }

        var at = text.IndexOf(before, StringComparison.Ordinal) + before.Length;
        return text[..at] + mark + text[text.IndexOf('\n', at)..];
    }
}
