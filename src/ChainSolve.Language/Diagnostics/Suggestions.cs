namespace ChainSolve.Language.Diagnostics;

/// <summary>Finds the known name that a misspelt one may have meant.</summary>
/// <remarks>Safe to share between threads.</remarks>
public static class Suggestions
{
    private const int LongestName = 64;

    /// <summary>The known name nearest to a word, or null where none is near enough.</summary>
    /// <param name="word">The word as written.</param>
    /// <param name="known">The names it may have meant; of equally near ones the first in ordinal order is taken.</param>
    /// <remarks>
    /// Near is a distance (insertions, deletions, replacements and swaps of neighbours; Damerau 1964) of at most a third of the word's
    /// length, at least 1. Cost: the product of the lengths for each name.
    /// </remarks>
    public static string? Nearest(string word, IEnumerable<string> known)
    {
        ArgumentNullException.ThrowIfNull(word);
        ArgumentNullException.ThrowIfNull(known);
        if (word.Length > LongestName)
        {
            return null;
        }

        var limit = Math.Max(1, word.Length / 3);
        string? best = null;
        var bestDistance = limit + 1;
        foreach (var name in known)
        {
            if (Math.Abs(name.Length - word.Length) > limit || name == word)
            {
                continue;
            }

            var distance = string.Equals(name, word, StringComparison.OrdinalIgnoreCase) ? 0 : Distance(word, name);
            if (distance < bestDistance || (distance == bestDistance && best is not null && string.CompareOrdinal(name, best) < 0))
            {
                best = name;
                bestDistance = distance;
            }
        }

        // A name of which every letter would change is no suggestion.
        return bestDistance < Math.Max(word.Length, best?.Length ?? 0) ? best : null;
    }

    private static int Distance(string a, string b)
    {
        var rows = new int[a.Length + 1, b.Length + 1];
        for (var i = 0; i <= a.Length; i++)
        {
            for (var j = 0; j <= b.Length; j++)
            {
                if (i == 0 || j == 0)
                {
                    rows[i, j] = i + j;
                    continue;
                }

                var cost = a[i - 1] == b[j - 1] ? 0 : 1;
                var least = Math.Min(Math.Min(rows[i - 1, j] + 1, rows[i, j - 1] + 1), rows[i - 1, j - 1] + cost);
                if (i > 1 && j > 1 && a[i - 1] == b[j - 2] && a[i - 2] == b[j - 1])
                {
                    least = Math.Min(least, rows[i - 2, j - 2] + 1);
                }

                rows[i, j] = least;
            }
        }

        return rows[a.Length, b.Length];
    }
}
