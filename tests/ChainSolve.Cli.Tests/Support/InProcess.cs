using System.CommandLine;
using System.Text;
using ChainSolve.Cli.Commands;
using ChainSolve.Cli.Terminal;

namespace ChainSolve.Cli.Tests.Support;

/// <summary>Runs commands inside the test's process, for tests that need no process of their own.</summary>
internal static class InProcess
{
    public static Task<Outcome> RunAsync(params string[] words) => RunAsync("", words);

    public static Task<Outcome> RunAsync(string input, string[] words) => RunAsync(CommandTree.Build, input, words);

    /// <summary>Runs a command of a tree of the caller's own.</summary>
    public static async Task<Outcome> RunAsync(
        Func<ProcessStreams, RootCommand> tree, string input, string[] words, Dictionary<string, string>? environment = null)
    {
        using var answer = new StringWriter();
        using var error = new StringWriter();
        using var signals = new SignalWatch();
        var streams = new ProcessStreams
        {
            Input = () => new MemoryStream(Encoding.UTF8.GetBytes(input)),
            Answer = answer,
            Error = error,
            ErrorIsTerminal = false,
            Environment = name => environment?.GetValueOrDefault(name),
        };
        var code = await CommandRunner.RunAsync(tree(streams), words, streams, signals);
        return new Outcome(code, answer.ToString().ReplaceLineEndings("\n"), error.ToString().ReplaceLineEndings("\n"));
    }
}
