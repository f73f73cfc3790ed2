using System.Diagnostics;
using ChainSolve.Tests.Shared.Files;

namespace ChainSolve.Cli.Tests.Support;

/// <summary>Runs the tool as people do: as a process of its own.</summary>
internal static class OwnProcess
{
    /// <summary>Runs a command to its end.</summary>
    public static async Task<Outcome> RunAsync(string[] words, string? input = null, string? folder = null, params (string Name, string Value)[] settings)
    {
        using var process = Start(words, folder, settings);
        if (input is not null)
        {
            await process.StandardInput.WriteAsync(input);
        }

        process.StandardInput.Close();
        return await EndOfAsync(process);
    }

    /// <summary>Starts a command and leaves it running.</summary>
    public static Process Start(string[] words, string? folder = null, params (string Name, string Value)[] settings)
    {
        var start = new ProcessStartInfo("dotnet")
        {
            RedirectStandardInput = true,
            RedirectStandardOutput = true,
            RedirectStandardError = true,
            WorkingDirectory = folder ?? Repository.Root,
        };
        start.ArgumentList.Add(Path.Combine(AppContext.BaseDirectory, "ChainSolve.Cli.dll"));
        foreach (var (name, value) in settings)
        {
            start.Environment[name] = value;
        }

        foreach (var word in words)
        {
            start.ArgumentList.Add(word);
        }

        return Process.Start(start) ?? throw new InvalidOperationException("The tool did not start.");
    }

    /// <summary>Waits for the end; a process that hangs is ended and the test fails.</summary>
    public static async Task<Outcome> EndOfAsync(Process process)
    {
        using var patience = new CancellationTokenSource(TimeSpan.FromMinutes(2));
        try
        {
            var answer = process.StandardOutput.ReadToEndAsync(patience.Token);
            var error = process.StandardError.ReadToEndAsync(patience.Token);
            await process.WaitForExitAsync(patience.Token);
            return new Outcome(process.ExitCode, (await answer).ReplaceLineEndings("\n"), (await error).ReplaceLineEndings("\n"));
        }
        catch (OperationCanceledException)
        {
            process.Kill(entireProcessTree: true);
            throw new TimeoutException("The tool did not end.");
        }
    }
}
