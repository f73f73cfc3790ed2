using System.Globalization;
using ChainSolve.Numerics.Iteration;
using Spectre.Console;

namespace ChainSolve.Cli.Terminal;

/// <summary>Shows how far a long piece of work has come, on a terminal and only if it takes a while.</summary>
internal sealed class ProgressDisplay(ProcessStreams streams, bool isWanted)
{
    private static readonly TimeSpan Patience = TimeSpan.FromMilliseconds(400);

    /// <summary>Does the work on another thread and shows its progress meanwhile.</summary>
    public Task<T> RunAsync<T>(Func<IProgress<SolveProgress>?, T> work, CancellationToken cancellation) =>
        isWanted && streams.ErrorIsTerminal && !streams.IsDumb ? WatchAsync(work, cancellation) : Task.FromResult(work(null));

    private async Task<T> WatchAsync<T>(Func<IProgress<SolveProgress>?, T> work, CancellationToken cancellation)
    {
        var latest = new Latest();
        var running = Task.Run(() => work(latest), cancellation);
        if (await Task.WhenAny(running, Task.Delay(Patience, CancellationToken.None)) != running)
        {
            await Show(running, latest);
        }

        return await running;
    }

    private async Task Show(Task running, Latest latest)
    {
        var console = AnsiConsole.Create(new AnsiConsoleSettings { Out = new AnsiConsoleOutput(streams.Error) });
        await console.Status().StartAsync("working", async context =>
        {
            while (await Task.WhenAny(running, Task.Delay(100, CancellationToken.None)) != running)
            {
                context.Status(Markup.Escape(latest.Text));
            }
        });
    }

    private sealed class Latest : IProgress<SolveProgress>
    {
        private volatile string text = "working";

        public string Text => text;

        public void Report(SolveProgress value)
        {
            var share = value.Total > 0
                ? string.Create(CultureInfo.InvariantCulture, $" {100.0 * value.Done / value.Total:0} %")
                : value.Done > 0 ? string.Create(CultureInfo.InvariantCulture, $" {value.Done:N0}") : "";
            text = value.Detail.Length > 0 ? $"{value.Stage}{share}, {value.Detail}" : value.Stage + share;
        }
    }
}
