namespace ChainSolve.Cli.Terminal;

/// <summary>Cancels work when a signal comes or its time is over, and tells the two apart.</summary>
internal sealed class Deadline : IDisposable
{
    private readonly CancellationTokenSource? timer;
    private readonly CancellationTokenSource linked;
    private readonly string text;

    /// <summary>Starts the clock.</summary>
    /// <param name="limit">The time that the work may take; null for any.</param>
    /// <param name="text">The limit as it was written, for the message.</param>
    /// <param name="stop">Cancelled by a signal.</param>
    public Deadline(TimeSpan? limit, string text, CancellationToken stop)
    {
        this.text = text;
        timer = limit is { } time ? new CancellationTokenSource(time) : null;
        linked = CancellationTokenSource.CreateLinkedTokenSource(stop, timer?.Token ?? CancellationToken.None);
    }

    public CancellationToken Token => linked.Token;

    /// <summary>The reason why the work was cancelled, where it was the time; otherwise null.</summary>
    public LimitExceededException? Reason => timer?.IsCancellationRequested == true
        ? new LimitExceededException("time", $"the time limit of {text} was hit; raise --time-limit")
        : null;

    public void Dispose()
    {
        linked.Dispose();
        timer?.Dispose();
    }
}
