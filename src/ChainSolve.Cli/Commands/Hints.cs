using ChainSolve.Language.Diagnostics;

namespace ChainSolve.Cli.Commands;

/// <summary>Says what someone may have meant.</summary>
internal static class Hints
{
    /// <summary>The words <c>; nearest: '…'</c>, or nothing.</summary>
    public static string Nearest(string word, IEnumerable<string> known) =>
        Suggestions.Nearest(word, known) is { } nearest ? $"; nearest: '{nearest}'" : "";
}
