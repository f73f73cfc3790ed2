using System.Globalization;
using System.Text.Json;
using ChainSolve.Language.Diagnostics;
using ChainSolve.Language.Text;
using ChainSolve.Reports;
using Json.Schema;

namespace ChainSolve.Tests.Reports;

/// <summary>Whole outputs of reports.</summary>
public class ReportTests
{
    private const string ExpectedText =
        """
        availability = probability flowing at 0 d, 1 d, 10 d
             0 d  1                  exact
             1 d  0.996657123456789  ± 2.3e-16
            10 d  1.25e-11           ± 1.1e-19
            by squaring (the chain is small)
            4 states, 25 levels

        costs = total cost over 8760 h, 1000 h
            8760 h  27886.072 EUR  ± 0.0004
            1000 h    -15.25 EUR   ± 3e-12 (estimated)
            by squaring (the chain is small)
            4 states, 25 levels

        first = mean time to stopped
            infinite
            infinite, because the condition is never met
            no time is spent before the end

        rough = expected flow steady
            1.2e3 per h  ± 20
            short: an error bound is wider than the 1e-9 of the value that was asked for
            by squaring (the chain is small)
            4 states, 25 levels

        spell = mean spell stopped steady
            no value: the condition never holds, so that it has no spells
            by squaring (the chain is small)
            4 states, 25 levels

        1,234 states, 1 transition, 0.012 s

        """;

    private const string ExpectedCsv =
        """
        # model: Lift, "old"
        # file: lift.chain, sha256 SHA
        # given: lambda = 3 per y
        # given: n = 2
        # given: wait = 84 h
        # version: 0.1.0
        # command: chainsolve solve lift.chain --format csv
        measure,kind,time [h],value,unit,error bound,status,reason
        availability,probability,0,1,,0,ok,
        availability,probability,24,0.996657123456789,,2.3e-16,ok,
        availability,probability,240,1.25e-11,,1.04e-19,ok,
        costs,total,8760,27886.0720567508,EUR,0.0004,ok,
        costs,total,1000,-15.25,EUR,3e-12,ok,
        first,mean time,,Infinity,h,0,ok,the condition is never met
        rough,expected,,1234.5,per h,20,short,
        spell,mean spell,,,h,,failed,"the condition never holds, so that it has no spells"

        """;

    [Fact]
    public void Write_Text_WholeOutput() => Assert.Equal(ExpectedText, Written(ReportFormat.Text));

    [Fact]
    public void Write_Csv_WholeOutput() =>
        Assert.Equal(
            ExpectedCsv.Replace("SHA", Sample.Model().Fingerprint, StringComparison.Ordinal),
            Written(ReportFormat.Csv, "chainsolve solve lift.chain --format csv"));

    [Fact]
    public void Write_Json_HasEveryValue()
    {
        using var document = JsonDocument.Parse(Written(ReportFormat.Json));
        var root = document.RootElement;
        Assert.Equal(
            ["schemaVersion", "model", "file", "timebase", "states", "transitions", "givens", "measures", "warnings", "elapsedSeconds"],
            root.EnumerateObject().Select(p => p.Name));
        Assert.Equal("Lift, \"old\"", root.GetProperty("model").GetString());
        Assert.Equal("""{ "name": "lambda", "value": 3, "unit": "per y" }""", Compact(root.GetProperty("givens")[0]));
        var measures = root.GetProperty("measures");
        Assert.Equal("""{ "time": 24, "value": 0.996657123456789, "errorBound": 2.3E-16 }""", Compact(measures[0].GetProperty("points")[1]));
        Assert.Equal("""{ "time": 1000, "value": -15.25, "errorBound": 3E-12, "estimated": true }""", Compact(measures[1].GetProperty("points")[1]));
        Assert.Equal("""{ "time": null, "value": "Infinity", "errorBound": 0, "reason": "the condition is never met" }""", Compact(measures[2].GetProperty("points")[0]));
        Assert.Equal(["ok", "ok", "ok", "short", "failed"], measures.EnumerateArray().Select(m => m.GetProperty("status").GetString()));
        Assert.Equal("""{ "code": "N201", "message": "the model can end in 2 groups", "line": 2, "column": 9 }""", Compact(root.GetProperty("warnings")[0]));
    }

    [Fact]
    public void Write_Json_FitsTheSchema() => Fits(Written(ReportFormat.Json), true);

    [Fact]
    public void WriteFaults_Json_FitsTheSchema()
    {
        var writer = new StringWriter();
        var source = new SourceText("a.chain", "item");
        Report.WriteFaults([new Diagnostic("L120", Severity.Fault, "a name was expected", new TextSpan(4, 0), source)], "a.chain", writer);
        Fits(writer.ToString(), true);
        Assert.Contains("\"column\": 5", writer.ToString(), StringComparison.Ordinal);
    }

    [Theory]
    [InlineData("\"errorBound\": 0", "\"errorBound\": -1")]
    [InlineData("\"status\": \"short\"", "\"status\": \"fine\"")]
    [InlineData("\"kind\": \"total\"", "\"kind\": \"sum\"")]
    [InlineData("\"Infinity\"", "\"endless\"")]
    [InlineData("\"schemaVersion\": 1", "\"schemaVersion\": 2")]
    [InlineData("\"file\": \"lift.chain\",", "")]
    public void Schema_DocumentThatIsWrong_DoesNotFit(string right, string wrong)
    {
        var text = Written(ReportFormat.Json);
        Assert.Contains(right, text, StringComparison.Ordinal);
        Fits(text.Replace(right, wrong, StringComparison.Ordinal), false);
    }

    [Theory]
    [InlineData(ReportFormat.Text)]
    [InlineData(ReportFormat.Json)]
    [InlineData(ReportFormat.Csv)]
    public void Write_CultureWithCommas_SameOutput(ReportFormat format)
    {
        var expected = Written(format);
        var before = CultureInfo.CurrentCulture;
        try
        {
            var culture = (CultureInfo)CultureInfo.InvariantCulture.Clone();
            (culture.NumberFormat.NumberDecimalSeparator, culture.NumberFormat.NumberGroupSeparator, culture.NumberFormat.NegativeSign) = (",", ".", "~");
            CultureInfo.CurrentCulture = culture;
            Assert.Equal(expected, Written(format));
        }
        finally
        {
            CultureInfo.CurrentCulture = before;
        }
    }

    [Fact]
    public void Write_Exploration_WholeOutput()
    {
        var found = new Exploration
        {
            Model = Sample.Model(),
            StateCount = 12,
            TransitionCount = 40,
            RecurrentClassCount = 3,
            TransientStateCount = 5,
            AbsorbingStateCount = 2,
            LargestExitRate = 0.5,
            Warnings = [],
            Elapsed = TimeSpan.FromSeconds(75.21),
        };
        var writer = new StringWriter();
        Report.Write(found, ReportFormat.Text, writer);
        Assert.Equal(
            """
            12 states, 40 transitions, 75.2 s
            5 states left for good sooner or later, 2 states never left, 1 group of states never left
            the fastest state is left at 0.5 per h
            3 givens, 0 measures

            """,
            writer.ToString());
        var ergodic = new StringWriter();
        Report.Write(found with { RecurrentClassCount = 1, TransientStateCount = 0, AbsorbingStateCount = 0 }, ReportFormat.Text, ergodic);
        Assert.Contains("\nevery state can be reached from every other\n", ergodic.ToString(), StringComparison.Ordinal);
        Assert.Throws<ArgumentOutOfRangeException>(() => Report.Write(found, ReportFormat.Csv, writer));
    }

    private static string Written(ReportFormat format, string? command = null)
    {
        var writer = new StringWriter();
        Report.Write(Sample.Solution(), format, writer, command);
        return writer.ToString();
    }

    private static string Compact(JsonElement element) =>
        string.Join(' ', element.GetRawText().Split('\n').Select(l => l.Trim()));

    private static void Fits(string json, bool fits)
    {
        var schema = JsonSchema.FromText(File.ReadAllText(Path.Combine(AppContext.BaseDirectory, "schema", "solve.schema.json")));
        using var document = JsonDocument.Parse(json);
        var verdict = schema.Evaluate(document.RootElement, new EvaluationOptions { OutputFormat = OutputFormat.List });
        Assert.True(verdict.IsValid == fits, string.Join("; ", (verdict.Details ?? []).Where(d => d.Errors is not null).SelectMany(d => d.Errors!).Select(e => $"{e.Key}: {e.Value}")));
    }
}
