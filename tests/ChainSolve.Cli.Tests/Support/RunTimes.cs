using System.Text.RegularExpressions;

namespace ChainSolve.Cli.Tests.Support;

/// <summary>Hides what differs from run to run: how long something took.</summary>
internal static partial class RunTimes
{
    public static string Hide(string text) => JsonSeconds().Replace(Seconds().Replace(text, "0.0 s"), "\"elapsedSeconds\": 0");

    [GeneratedRegex(@"\b\d+(\.\d+)?(e-?\d+)? (s|ms)(?=\r?$)", RegexOptions.Multiline)]
    private static partial Regex Seconds();

    [GeneratedRegex("\"elapsedSeconds\": [-+0-9.eE]+")]
    private static partial Regex JsonSeconds();
}
