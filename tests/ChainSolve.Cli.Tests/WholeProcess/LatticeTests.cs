using System.Globalization;
using ChainSolve.Cli.Commands;
using ChainSolve.Cli.Tests.Support;

namespace ChainSolve.Cli.Tests.WholeProcess;

/// <summary>A million states from text to numbers, in a process that may not use more memory than is promised.</summary>
[Trait("Category", "Long")]
public class LatticeTests
{
    private const int Replicas = 15;

    // Bytes, in hexadecimal as the runtime reads them: 1.4e9.
    private static readonly (string Name, string Value) HeapLimit = ("DOTNET_GCHeapHardLimit", 1_400_000_000.ToString("x", CultureInfo.InvariantCulture));

    private static readonly (double Failure, double Repair, int Needed)[] Items =
        [(1e-3, 0.01, 12), (2e-3, 0.02, 12), (3e-3, 0.015, 10), (1.5e-3, 0.03, 12), (2.5e-3, 0.025, 12)];

    private static string Text =>
        string.Concat(Items.Select((item, i) => string.Create(
            CultureInfo.InvariantCulture,
            $"item u{i} x {Replicas} {{ up -> down at {item.Failure} per h; down -> up at {item.Repair} per h }}\n")))
        + $"let good = {string.Join(" and ", Items.Select((item, i) => $"u{i}.up >= {item.Needed}"))}\n"
        + "measure at_times = probability good at 10 h, 100 h, 500 h\n"
        + "measure long_run = probability good steady\n";

    [Theory]
    [InlineData(null)]
    [InlineData("gauss-seidel")]
    public async Task Solve_FiveItemsOfFifteen_IsTheProductOfBinomialTails(string? method)
    {
        string[] choice = method is null ? [] : ["--method", $"stationary={method}", "--measure", "long_run"];

        var outcome = await OwnProcess.RunAsync(["solve", "-", "--format", "csv", "--quiet", .. choice], Text, settings: [HeapLimit]);

        Assert.Equal("", outcome.Error);
        Assert.Equal(ExitCodes.Done, outcome.ExitCode);
        var rows = outcome.Answer.Split('\n', StringSplitOptions.RemoveEmptyEntries).Where(l => l[0] != '#').Skip(1).Select(l => l.Split(',')).ToList();
        Assert.Equal(method is null ? 4 : 1, rows.Count);
        Assert.All(rows, row => Assert.Equal(
            1, double.Parse(row[3], CultureInfo.InvariantCulture) / Truth(row[2].Length == 0 ? null : double.Parse(row[2], CultureInfo.InvariantCulture)), 1e-10));
    }

    /// <summary>Parts are independent, each up with the chance m/(l+m) + l/(l+m) exp(-(l+m)t) (closed form of two states).</summary>
    private static double Truth(double? time) =>
        Items.Aggregate(1.0, (product, item) =>
        {
            var sum = item.Failure + item.Repair;
            var up = (item.Repair + (time is { } t ? item.Failure * Math.Exp(-sum * t) : 0)) / sum;
            return product * Enumerable.Range(item.Needed, Replicas - item.Needed + 1).Sum(k => Choose(k) * Math.Pow(up, k) * Math.Pow(1 - up, Replicas - k));
        });

    private static double Choose(int k) => Enumerable.Range(1, k).Aggregate(1.0, (c, i) => c * (Replicas - k + i) / i);
}
