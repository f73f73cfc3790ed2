using System.CommandLine;
using System.CommandLine.Invocation;
using ChainSolve.Cli.Terminal;
using ChainSolve.Numerics.Iteration;

namespace ChainSolve.Cli.Commands;

/// <summary>Runs one command from its words to its exit code.</summary>
internal static class CommandRunner
{
    // Words that begin with @ are file names like any other.
    private static readonly ParserConfiguration Parsing = new() { ResponseFileTokenReplacer = null };

    /// <summary>Runs a command.</summary>
    /// <param name="root">All commands.</param>
    /// <param name="words">The words behind the name of the program.</param>
    /// <param name="streams">What it reads and writes.</param>
    /// <param name="signals">Tells when the process is to stop.</param>
    /// <returns>The exit code.</returns>
    public static async Task<int> RunAsync(RootCommand root, string[] words, ProcessStreams streams, SignalWatch signals)
    {
        try
        {
            var parsed = root.Parse(words, Parsing);
            if (UsageMessages.Describe(parsed) is { } message)
            {
                throw new UsageException(message);
            }

            // Signals are ours: the parser's own handling would end the process without an exit code that tells why. What it runs
            // itself is help and the version.
            var code = parsed.Action is AsynchronousCommandLineAction command
                ? await command.InvokeAsync(parsed, signals.Token)
                : parsed.Invoke(new InvocationConfiguration { EnableDefaultExceptionHandler = false, Output = streams.Answer, Error = streams.Error });
            await streams.Answer.FlushAsync(CancellationToken.None);
            return code;
        }
        catch (Exception exception)
        {
            return Explain(exception, streams.Error, signals);
        }
    }

    private static int Explain(Exception exception, TextWriter error, SignalWatch signals)
    {
        switch (exception)
        {
            case UsageException:
                error.WriteLine($"chainsolve: {exception.Message}");
                error.WriteLine("chainsolve --help lists commands and options");
                return ExitCodes.Usage;
            case OperationCanceledException when signals.ExitCode is { } code:
                error.WriteLine("chainsolve: stopped");
                return code;
            case LimitExceededException:
                error.WriteLine($"chainsolve: {exception.Message}");
                return ExitCodes.LimitHit;
            case OutOfMemoryException or AggregateException { InnerExceptions: [OutOfMemoryException, ..] }:
                error.WriteLine("chainsolve: memory ran out; raise --max-memory, ask for fewer measures, or write alike things as one item with 'x N'");
                return ExitCodes.LimitHit;
            case NotConvergedException:
                error.WriteLine($"chainsolve: {exception.Message}");
                return ExitCodes.AccuracyNotReached;
            case FileProblemException or IOException or UnauthorizedAccessException:
                error.WriteLine($"chainsolve: {exception.Message}");
                return ExitCodes.FileProblem;
            default:
                error.WriteLine($"chainsolve: internal fault, please report it with the model: {exception}");
                return ExitCodes.InternalFault;
        }
    }
}
