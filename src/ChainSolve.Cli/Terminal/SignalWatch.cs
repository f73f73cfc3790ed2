using System.Runtime.InteropServices;
using ChainSolve.Cli.Commands;

namespace ChainSolve.Cli.Terminal;

/// <summary>
/// Turns the first SIGINT or SIGTERM into a cancellation, so that the work ends in an orderly way. The second one
/// ends the process at once.
/// </summary>
internal sealed class SignalWatch : IDisposable
{
    private readonly CancellationTokenSource source = new();
    private readonly PosixSignalRegistration[] registrations;
    private int exitCode;

    public SignalWatch()
    {
        registrations =
        [
            PosixSignalRegistration.Create(PosixSignal.SIGINT, context => Stop(context, ExitCodes.Interrupted)),
            PosixSignalRegistration.Create(PosixSignal.SIGTERM, context => Stop(context, ExitCodes.Terminated)),
        ];
    }

    /// <summary>Cancelled at the first signal.</summary>
    public CancellationToken Token => source.Token;

    /// <summary>The exit code that the signal asks for; null where none came.</summary>
    public int? ExitCode => Volatile.Read(ref exitCode) is var code && code == 0 ? null : code;

    public void Dispose()
    {
        foreach (var registration in registrations)
        {
            registration.Dispose();
        }

        source.Dispose();
    }

    private void Stop(PosixSignalContext context, int code)
    {
        if (Interlocked.CompareExchange(ref exitCode, code, 0) == 0)
        {
            context.Cancel = true;
            source.Cancel();
        }
    }
}
