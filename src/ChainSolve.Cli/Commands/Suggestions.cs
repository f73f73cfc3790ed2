namespace ChainSolve.Cli.Commands;

/// <summary>Finds what someone may have meant.</summary>
internal static class Suggestions
{
    /// <summary>
    /// The known word with the fewest changes of a letter (missing, added, replaced, two exchanged); null where even
    /// that needs more than a third of the letters.
    /// </summary>
    public static string? Nearest(string word, IEnumerable<string> known)
    {
        var best = known
            .Select(candidate => (Candidate: candidate, Distance: Distance(word, candidate)))
            .OrderBy(pair => pair.Distance)
            .ThenBy(pair => pair.Candidate, StringComparer.Ordinal)
            .FirstOrDefault();
        var allowed = Math.Max(1, word.Length / 3);
        return best.Candidate is not null && best.Distance <= allowed ? best.Candidate : null;
    }

    /// <summary>The words <c>; nearest: '…'</c>, or nothing.</summary>
    public static string Hint(string word, IEnumerable<string> known) =>
        Nearest(word, known) is { } nearest ? $"; nearest: '{nearest}'" : "";

    // Optimal string alignment distance (Damerau 1964; Levenshtein 1966).
    private static int Distance(string a, string b)
    {
        var rows = new int[a.Length + 1, b.Length + 1];
        for (var i = 0; i <= a.Length; i++)
        {
            rows[i, 0] = i;
        }

        for (var j = 0; j <= b.Length; j++)
        {
            rows[0, j] = j;
        }

        for (var i = 1; i <= a.Length; i++)
        {
            for (var j = 1; j <= b.Length; j++)
            {
                var replace = rows[i - 1, j - 1] + (a[i - 1] == b[j - 1] ? 0 : 1);
                rows[i, j] = Math.Min(replace, Math.Min(rows[i - 1, j], rows[i, j - 1]) + 1);
                if (i > 1 && j > 1 && a[i - 1] == b[j - 2] && a[i - 2] == b[j - 1])
                {
                    rows[i, j] = Math.Min(rows[i, j], rows[i - 2, j - 2] + 1);
                }
            }
        }

        return rows[a.Length, b.Length];
    }
}
