using System.Diagnostics;
using System.Text.Json;

namespace ChainSolve.Benchmarks.Jobs;

/// <summary>What the points of a sweep take: the first one explores the model, the further ones have the same states.</summary>
internal static class SweepTimer
{
    /// <summary>Prints one line of JSON: seconds of the first point, and of each further one.</summary>
    /// <param name="file">The model.</param>
    /// <param name="measure">The measure.</param>
    /// <param name="given">The given that takes other values.</param>
    /// <param name="values">Its values for the further points, as they are written in a model.</param>
    public static void Run(string file, string measure, string given, string[] values)
    {
        var options = new SolveOptions { Threads = Environment.ProcessorCount };
        var model = Model.Load(file);
        var first = Seconds(model, measure, options);
        var further = Array.ConvertAll(values, v => Seconds(model.With(given, v), measure, options));
        Console.WriteLine(JsonSerializer.Serialize(new { first, further }));
    }

    private static double Seconds(Model model, string measure, SolveOptions options)
    {
        var clock = Stopwatch.StartNew();
        _ = model.Solve(measure, options);
        return clock.Elapsed.TotalSeconds;
    }
}
