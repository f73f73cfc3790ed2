using System.Diagnostics;
using System.Globalization;
using ChainSolve.Numerics.Iteration;

namespace ChainSolve.StateSpace;

/// <summary>Tells how far exploring is, each few thousand states.</summary>
internal sealed class ExploreReport(IProgress<SolveProgress>? progress)
{
    private const int StatesBetweenReports = 4096;

    private readonly long start = Stopwatch.GetTimestamp();
    private long due;

    /// <param name="found">How many states were found.</param>
    /// <param name="lookedAt">How many of them were expanded.</param>
    /// <param name="bytes">How much memory they take.</param>
    public void Tell(long found, long lookedAt, long bytes)
    {
        if (progress is not null && lookedAt >= due)
        {
            due = lookedAt + StatesBetweenReports;
            var seconds = Stopwatch.GetElapsedTime(start).TotalSeconds;
            progress.Report(new SolveProgress(
                "exploring", found, 0, string.Create(CultureInfo.InvariantCulture, $"{found / Math.Max(seconds, 1e-3):N0} states/s, {bytes / 1e6:N0} MB")));
        }
    }
}
