using System.Diagnostics;
using System.Globalization;
using System.Text;
using ChainSolve.Language.Parsing;
using ChainSolve.Language.Printing;
using ChainSolve.Language.Text;

namespace ChainSolve.Tests.Fuzz;

/// <summary>Whatever is read ends in a model or in faults, soon and in little memory.</summary>
public class BrokenTextTests
{
    private const long MostBytes = 200_000_000;

    private static readonly TimeSpan Longest = TimeSpan.FromSeconds(2);

    [Fact]
    public void TryRead_ThousandsOfBrokenTexts_EndInAModelOrInFaults() => ReadAll(0, 5_000);

    /// <summary>A hundred parts; the variable makes them longer than a build server has time for.</summary>
    [Fact]
    [Trait("Category", "Long")]
    public void TryRead_ManyMoreBrokenTexts_EndInAModelOrInFaults()
    {
        var length = int.Parse(Environment.GetEnvironmentVariable("CHAINSOLVE_BROKEN_TEXTS") ?? "100000", CultureInfo.InvariantCulture) / 100;
        Parallel.For(
            0, 100, new ParallelOptions { MaxDegreeOfParallelism = Environment.ProcessorCount }, part => ReadAll(1_000_000 + (part * length), length));
    }

    private static void ReadAll(int first, int count)
    {
        var texts = new BrokenTexts();
        var (models, faults) = (0, 0);
        for (var number = first; number < first + count; number++)
        {
            var bytes = texts.Make(number);
            if (Read(bytes, number))
            {
                models++;
            }
            else
            {
                faults++;
            }
        }

        // Both ends are met, so that the texts are neither all whole nor all beyond recognition.
        Assert.True(models > 0 && faults > count / 2, string.Create(CultureInfo.InvariantCulture, $"{models} models, {faults} with faults"));
    }

    private static bool Read(byte[] bytes, int number)
    {
        var before = GC.GetAllocatedBytesForCurrentThread();
        var start = Stopwatch.GetTimestamp();
        ModelReading reading;
        try
        {
            reading = Model.TryRead(bytes, "broken.chain");
        }
        catch (Exception exception)
        {
            throw new InvalidOperationException($"Text {number} was not read:\n{Encoding.UTF8.GetString(bytes)}", exception);
        }

        var (elapsed, allocated) = (Stopwatch.GetElapsedTime(start), GC.GetAllocatedBytesForCurrentThread() - before);
        Assert.True(elapsed < Longest && allocated < MostBytes, $"Text {number} took {elapsed} and {allocated} bytes:\n{Encoding.UTF8.GetString(bytes)}");
        Assert.True(reading.Model is not null || reading.Diagnostics.Count > 0, $"Text {number} gave neither a model nor a fault.");
        Assert.True(reading.Diagnostics.Count <= 60, $"Text {number} gave {reading.Diagnostics.Count} faults.");
        Assert.All(reading.Diagnostics, d => Assert.True(d.Position.Line >= 1 && d.Position.Column >= 1 && d.Message.Length > 0));
        PrintsAsItReads(Encoding.UTF8.GetString(bytes), number);
        return reading.Model is not null;
    }

    /// <summary>What could be read is printed, read again without a fault, and printed alike.</summary>
    private static void PrintsAsItReads(string text, int number)
    {
        var parsed = ModelParser.Parse(new SourceText("broken.chain", text));
        if (parsed.Diagnostics.Count > 0)
        {
            return;
        }

        var printed = ModelPrinter.Print(parsed.Model);
        var again = ModelParser.Parse(new SourceText("printed.chain", printed));
        Assert.True(again.Diagnostics.Count == 0 && ModelPrinter.Print(again.Model) == printed, $"Text {number} is not printed as it reads:\n{text}\n\n{printed}");
    }
}
