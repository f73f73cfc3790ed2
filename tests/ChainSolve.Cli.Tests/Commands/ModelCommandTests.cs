using System.CommandLine;
using System.Text.Json;
using ChainSolve.Cli.Commands;
using ChainSolve.Cli.Terminal;
using ChainSolve.Cli.Tests.Support;
using ChainSolve.Language.Diagnostics;
using ChainSolve.Language.Text;
using ChainSolve.Numerics.Iteration;

namespace ChainSolve.Cli.Tests.Commands;

public sealed class ModelCommandTests : IDisposable
{
    private static readonly SourceText Source = new("m.chain", "item a\n");
    private static readonly Diagnostic Fault = new("B204", Severity.Fault, "unknown name", new TextSpan(5, 1), Source);
    private static readonly Diagnostic Warning = new("B310", Severity.Warning, "never left", new TextSpan(5, 1), Source);

    private readonly TemporaryFolder folder = new();

    [Fact]
    public async Task Run_Answer_GoesToStandardOutputAlone()
    {
        var outcome = await RunAsync(Answering(), "solve", "-");

        Assert.Equal(new Outcome(ExitCodes.Done, "42\n", ""), outcome);
    }

    [Fact]
    public async Task Run_Out_WritesTheFileAndNothingElse()
    {
        var outcome = await RunAsync(Answering(), "solve", "-", "--out", folder.File("answer"));

        Assert.Equal(new Outcome(ExitCodes.Done, "", ""), outcome);
        Assert.Equal("42\n", File.ReadAllText(folder.File("answer")));
    }

    [Fact]
    public async Task Run_AccuracyNotReached_StillWritesTheAnswer()
    {
        var session = new FakeSession(_ => new CommandAnswer(ExitCodes.AccuracyNotReached, w => w.Write("42\n"), "'m' fell short"));

        var outcome = await RunAsync(session, "solve", "-");

        Assert.Equal(new Outcome(ExitCodes.AccuracyNotReached, "42\n", "chainsolve: 'm' fell short\n"), outcome);
    }

    [Theory]
    [InlineData("", "m.chain:1:6  B310  warning: never left\n    item a\n         ^\n")]
    [InlineData("--quiet", "")]
    public async Task Run_Warnings_GoToTheErrorStreamUnlessQuiet(string option, string error)
    {
        var outcome = await RunAsync(Answering(Warning), ["check", "-", .. option.Split(' ', StringSplitOptions.RemoveEmptyEntries)]);

        Assert.Equal(new Outcome(ExitCodes.Done, "42\n", error), outcome);
    }

    [Fact]
    public async Task Run_ColorAlways_PaintsTheCode()
    {
        var outcome = await RunAsync(Answering(Warning), "check", "-", "--color", "always");

        Assert.Contains("\e[33mB310\e[0m", outcome.Error, StringComparison.Ordinal);
    }

    [Fact]
    public async Task Run_Faults_AreTold()
    {
        var outcome = await RunAsync(Throwing(new ModelFaultsException([Fault])), "solve", "-");

        Assert.Equal(new Outcome(ExitCodes.ModelFaults, "", "m.chain:1:6  B204  unknown name\n    item a\n         ^\n"), outcome);
    }

    [Fact]
    public async Task Run_FaultsAsJson_AreADocumentAndOneLine()
    {
        var outcome = await RunAsync(Throwing(new ModelFaultsException([Fault, Warning])), "solve", "-", "--format", "json");

        Assert.Equal(ExitCodes.ModelFaults, outcome.ExitCode);
        Assert.Equal("chainsolve: the model has a fault\n", outcome.Error);
        using var document = JsonDocument.Parse(outcome.Answer);
        var fault = Assert.Single(document.RootElement.GetProperty("faults").EnumerateArray());
        Assert.Equal("B204", fault.GetProperty("code").GetString());
        Assert.Equal(6, fault.GetProperty("column").GetInt32());
        Assert.Equal("B310", document.RootElement.GetProperty("warnings")[0].GetProperty("code").GetString());
    }

    [Fact]
    public async Task Run_TimeLimit_NamesTheLimit()
    {
        var session = new FakeSession(work =>
        {
            work.Cancellation.WaitHandle.WaitOne(TimeSpan.FromMinutes(1));
            work.Cancellation.ThrowIfCancellationRequested();
            throw new InvalidOperationException("The time limit did not come.");
        });

        var outcome = await RunAsync(session, "solve", "-", "--time-limit", "20 ms");

        Assert.Equal(new Outcome(ExitCodes.LimitHit, "", "chainsolve: the time limit of 20 ms was hit; raise --time-limit\n"), outcome);
    }

    [Fact]
    public async Task Run_OtherFailures_HaveTheirExitCodes()
    {
        Assert.Equal(ExitCodes.LimitHit, (await RunAsync(Throwing(new LimitExceededException("states", "too many")), "solve", "-")).ExitCode);
        Assert.Equal(ExitCodes.AccuracyNotReached, (await RunAsync(Throwing(new NotConvergedException("no end")), "solve", "-")).ExitCode);
        Assert.Equal(ExitCodes.InternalFault, (await RunAsync(Throwing(new InvalidOperationException("odd")), "solve", "-")).ExitCode);
    }

    [Fact]
    public async Task Run_MissingFile_SuggestsTheNearest()
    {
        folder.Write("pumps.chain", "");

        var outcome = await RunAsync(Answering(), "solve", folder.File("pumsp.chain"));

        Assert.Equal(ExitCodes.FileProblem, outcome.ExitCode);
        Assert.Equal($"chainsolve: there is no file '{folder.File("pumsp.chain")}'; nearest: 'pumps.chain'\n", outcome.Error);
    }

    [Theory]
    [InlineData("solve - --measure a --measure b", "solve a b")]
    [InlineData("matrix - --at 2d", "matrix 48")]
    [InlineData("likely - --at 90min", "likely 1.5 10")]
    [InlineData("likely - --steady --count 3", "likely  3")]
    public async Task Run_Options_ReachTheModel(string words, string expected)
    {
        var session = Answering();

        await RunAsync(session, words.Split(' '));

        Assert.Equal(expected, Assert.Single(session.Asked));
    }

    [Theory]
    [InlineData("matrix -", "'--at' is missing: chainsolve matrix FILE --at TIME")]
    [InlineData("matrix - --at 3", "--at needs a unit, for example --at \"3 h\"")]
    [InlineData("likely -", "say when: either --at TIME or --steady")]
    [InlineData("likely - --at 3h --steady", "say when: either --at TIME or --steady")]
    [InlineData("likely - --steady --count 0", "'--count 0' is not a whole number from 1 to 1000000")]
    [InlineData("solve - --method gth", "'--method gth' is not JOB=NAME, for example --method transient=uniformization")]
    [InlineData("solve - --method steady=gth", "'--method' does not know 'steady'; known: transient, stationary, absorption")]
    [InlineData("solve - --method transient=squarin", "'--method transient=' does not know 'squarin'; known: squaring, uniformization, krylov; nearest: 'squaring'")]
    [InlineData("solve - --method transient=squaring --method transient=uniformization", "'--method transient=' is given twice")]
    [InlineData("solve - --tolerance 2", "'--tolerance 2' is not a number above 0 and below 1, for example --tolerance 1e-9")]
    [InlineData("solve - --max-memory 4", "'--max-memory 4' is not a size of 200 MB or more with its unit, for example --max-memory 500MB or --max-memory \"4 GB\"")]
    [InlineData("solve - --max-memory 20MB", "'--max-memory 20MB' is not a size of 200 MB or more with its unit, for example --max-memory 500MB or --max-memory \"4 GB\"")]
    [InlineData("solve - --set mttr", "'--set mttr' is not NAME=VALUE, for example --set mttr=\"4 h\"")]
    public async Task Run_WrongOptions_SayWhatIsWanted(string words, string message)
    {
        var outcome = await RunAsync(Answering(), words.Split(' '));

        Assert.Equal(ExitCodes.Usage, outcome.ExitCode);
        Assert.StartsWith($"chainsolve: {message}\n", outcome.Error, StringComparison.Ordinal);
    }

    [Fact]
    public async Task Run_OutInAFolderThatIsMissing_SaysSoBeforeTheWork()
    {
        var session = Answering();

        var outcome = await RunAsync(session, "solve", "-", "--out", folder.File("missing/answer"));

        Assert.Equal(
            new Outcome(ExitCodes.FileProblem, "", $"chainsolve: '{folder.File("missing/answer")}' cannot be written: there is no folder '{folder.File("missing")}'\n"),
            outcome);
        Assert.Empty(session.Asked);
    }

    public void Dispose() => folder.Dispose();

    private static FakeSession Answering(params Diagnostic[] warnings) =>
        new(_ => new CommandAnswer(ExitCodes.Done, writer => writer.Write("42\n"))) { Warnings = warnings };

    private static FakeSession Throwing(Exception exception) => new(_ => throw exception);

    private static Task<Outcome> RunAsync(FakeSession session, params string[] words) => InProcess.RunAsync(Tree(session), "", words);

    private static Func<ProcessStreams, RootCommand> Tree(FakeSession session) => streams =>
    {
        var runner = new ModelCommand(streams, (_, _) => session);
        return [ModelCommands.Check(runner), ModelCommands.Solve(runner), ModelCommands.Matrix(runner), ModelCommands.Likely(runner)];
    };
}
