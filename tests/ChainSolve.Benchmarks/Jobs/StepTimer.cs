using System.Globalization;
using System.Text.Json;
using System.Text.RegularExpressions;

namespace ChainSolve.Benchmarks.Jobs;

/// <summary>
/// What a step of uniformization takes, as the library takes it: the difference in time between a measure at a far and at a near
/// time, over the difference in steps. What both need once is not in it.
/// </summary>
internal static partial class StepTimer
{
    private const int Rounds = 3;

    /// <summary>Prints one line of JSON: seconds of a step, sizes, and how the steps were taken.</summary>
    /// <param name="file">The model.</param>
    /// <param name="threads">How many threads may work.</param>
    /// <param name="near">A measure of few steps.</param>
    /// <param name="far">The same measure at a later time.</param>
    public static void Run(string file, int threads, string near, string far)
    {
        var model = Model.Load(file);
        var options = new SolveOptions { Threads = threads, TransientMethod = "uniformization" };
        var size = model.Explore(options);
        _ = Seconds(model, near, options);
        var seconds = new double[Rounds];
        var how = "";
        for (var round = 0; round < Rounds; round++)
        {
            var (first, fewer, _) = Seconds(model, near, options);
            (var second, var more, how) = Seconds(model, far, options);
            seconds[round] = (second - first) / (more - fewer);
        }

        Array.Sort(seconds);
        Console.WriteLine(JsonSerializer.Serialize(new { step = seconds[Rounds / 2], states = size.StateCount, transitions = size.TransitionCount, how }));
    }

    private static (double Seconds, int Steps, string How) Seconds(Model model, string measure, SolveOptions options)
    {
        var clock = System.Diagnostics.Stopwatch.StartNew();
        var how = model.Solve(measure, options).How;
        var seconds = clock.Elapsed.TotalSeconds;
        var steps = StepCount().Match(how);
        return steps.Success
            ? (seconds, int.Parse(steps.Groups[1].Value, NumberStyles.AllowThousands, CultureInfo.InvariantCulture), how)
            : throw new InvalidOperationException($"no number of steps is told in '{how}'");
    }

    [GeneratedRegex("([0-9,]+) steps")]
    private static partial Regex StepCount();
}
