using ChainSolve.Cli.Terminal;
using ChainSolve.Language.Diagnostics;
using ChainSolve.Reports;

namespace ChainSolve.Cli.Commands;

/// <summary>What all commands on a model have in common: read, work under a deadline, write the answer, tell warnings.</summary>
internal sealed class ModelCommand(ProcessStreams streams, Func<byte[], Request, IModelSession> open)
{
    /// <summary>Runs a command on a model.</summary>
    /// <returns>The exit code.</returns>
    public async Task<int> RunAsync(Request request, Func<IModelSession, Work, CommandAnswer> command, CancellationToken stop)
    {
        if (request.MaxMemory is { } most)
        {
            streams.HoldMemory(most);
        }

        var printer = new FaultPrinter(streams.Error, ColorChoice.Uses(request.Color, streams));
        var sink = new AnswerSink(streams, request.Output);
        sink.Check();
        using var deadline = new Deadline(request.TimeLimit, request.TimeLimitText ?? "", stop);
        try
        {
            var content = await ModelFile.ReadAsync(request.File, streams, deadline.Token);
            var display = new ProgressDisplay(streams, !request.IsQuiet);
            IModelSession session = null!;
            var answer = await display.RunAsync(
                progress =>
                {
                    session = open(content, request);
                    return command(session, new Work(progress, deadline.Token));
                },
                deadline.Token);

            if (!request.IsQuiet)
            {
                foreach (var note in session.Notes)
                {
                    await streams.Error.WriteLineAsync($"set: {note}");
                }

                printer.Print(session.Warnings);
            }

            sink.Write(answer.Write);
            if (answer.Complaint is { } complaint)
            {
                await streams.Error.WriteLineAsync($"chainsolve: {complaint}");
            }

            return answer.ExitCode;
        }
        catch (OperationCanceledException) when (deadline.Reason is { } reason && !stop.IsCancellationRequested)
        {
            throw reason;
        }
        catch (ModelFaultsException exception) when (request.Format == "json")
        {
            sink.Write(writer => Report.WriteFaults(exception.Faults, request.File, writer));
            await streams.Error.WriteLineAsync($"chainsolve: {CountOf(exception.Faults)}");
            return ExitCodes.ModelFaults;
        }
        catch (ModelFaultsException exception)
        {
            printer.Print(exception.Faults.Where(f => f.Severity == Severity.Fault || !request.IsQuiet));
            return ExitCodes.ModelFaults;
        }
    }

    private static string CountOf(IReadOnlyList<Diagnostic> diagnostics)
    {
        var count = diagnostics.Count(d => d.Severity == Severity.Fault);
        return count == 1 ? "the model has a fault" : $"the model has {count} faults";
    }
}
