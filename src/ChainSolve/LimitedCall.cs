using System.Globalization;

namespace ChainSolve;

/// <summary>Runs a call that may take a limited time.</summary>
internal static class LimitedCall
{
    /// <exception cref="LimitExceededException">The time was up.</exception>
    public static T Run<T>(SolveOptions options, Func<CancellationToken, T> call, CancellationToken cancellation)
    {
        cancellation.ThrowIfCancellationRequested();
        if (options.TimeLimit is not { } limit)
        {
            return call(cancellation);
        }

        using var clock = CancellationTokenSource.CreateLinkedTokenSource(cancellation);
        clock.CancelAfter(limit);
        try
        {
            return call(clock.Token);
        }
        catch (OperationCanceledException) when (!cancellation.IsCancellationRequested)
        {
            throw new LimitExceededException("time", string.Create(
                CultureInfo.InvariantCulture,
                $"the time limit of {limit.TotalSeconds:0.###} s was hit; raise it (TimeLimit, --time-limit), ask for fewer measures, or for shorter times"));
        }
    }
}
