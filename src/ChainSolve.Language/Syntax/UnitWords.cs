using System.Collections.Frozen;

namespace ChainSolve.Language.Syntax;

/// <summary>
/// The unit words of the notation: times, <c>FIT</c> (1e-9 per hour) and <c>%</c>. They are not reserved: a word is a unit only
/// where it stands directly behind a number or bracket, or behind <c>per</c>.
/// </summary>
/// <remarks>Safe to share between threads.</remarks>
public static class UnitWords
{
    private static readonly FrozenSet<string> Known = new[] { "ms", "s", "min", "h", "d", "wk", "mo", "y", "FIT", "%" }.ToFrozenSet();

    /// <summary>All unit words, in no particular order.</summary>
    public static IEnumerable<string> All => Known;

    /// <summary>Whether a word is a unit; case counts.</summary>
    public static bool Contains(string word) => Known.Contains(word);
}
