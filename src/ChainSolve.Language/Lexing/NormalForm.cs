using System.Text;

namespace ChainSolve.Language.Lexing;

/// <summary>
/// Normal form C of Unicode (Unicode Standard Annex 15), so that an accented letter is one name however it was typed. The platform's own
/// normalization does nothing where it runs without the data of a culture library.
/// </summary>
/// <remarks>Safe to share between threads.</remarks>
internal static class NormalForm
{
    // Below this no character is changed by normal form C, nor combines with one before it.
    private const char FirstThatChanges = '\u0300';

    // Hangul syllables are composed by a formula (The Unicode Standard, section 3.12).
    private const int Syllables = 0xAC00;
    private const int Leads = 0x1100;
    private const int Vowels = 0x1161;
    private const int Trails = 0x11A7;
    private const int LeadCount = 19;
    private const int VowelCount = 21;
    private const int TrailCount = 28;

    private static readonly Lazy<NormalFormTable> Table = new(NormalFormTable.Load);

    /// <summary>The text in normal form C.</summary>
    public static string Of(string text)
    {
        if (text.All(c => c < FirstThatChanges))
        {
            return text;
        }

        var characters = Decompose(text, Table.Value);
        Order(characters, Table.Value);
        Compose(characters, Table.Value);
        var result = new StringBuilder(text.Length);
        characters.ForEach(c => result.Append(new Rune(c).ToString()));
        return result.ToString();
    }

    private static List<int> Decompose(string text, NormalFormTable table)
    {
        var characters = new List<int>(text.Length);
        foreach (var rune in text.EnumerateRunes())
        {
            var syllable = rune.Value - Syllables;
            if (syllable is >= 0 and < LeadCount * VowelCount * TrailCount)
            {
                characters.Add(Leads + (syllable / (VowelCount * TrailCount)));
                characters.Add(Vowels + (syllable % (VowelCount * TrailCount) / TrailCount));
                if (syllable % TrailCount > 0)
                {
                    characters.Add(Trails + (syllable % TrailCount));
                }
            }
            else if (table.Decomposition(rune.Value) is { } parts)
            {
                characters.AddRange(parts);
            }
            else
            {
                characters.Add(rune.Value);
            }
        }

        return characters;
    }

    // Marks behind a letter in the order of their classes; those of one class stay as they were.
    private static void Order(List<int> characters, NormalFormTable table)
    {
        for (var i = 1; i < characters.Count; i++)
        {
            var (mark, rank) = (characters[i], table.ClassOf(characters[i]));
            var at = i;
            for (; rank > 0 && at > 0 && table.ClassOf(characters[at - 1]) > rank; at--)
            {
                characters[at] = characters[at - 1];
            }

            characters[at] = mark;
        }
    }

    private static void Compose(List<int> characters, NormalFormTable table)
    {
        var (starter, kept, lastClass) = (-1, 0, 0);
        foreach (var character in characters.ToArray())
        {
            var rank = table.ClassOf(character);
            var isNear = starter == kept - 1 || (lastClass < rank && lastClass > 0);
            if (starter >= 0 && isNear && Pair(characters[starter], character, table) is { } whole)
            {
                characters[starter] = whole;
                continue;
            }

            (starter, lastClass) = rank == 0 ? (kept, 0) : (starter, rank);
            characters[kept++] = character;
        }

        characters.RemoveRange(kept, characters.Count - kept);
    }

    private static int? Pair(int first, int second, NormalFormTable table)
    {
        if (first - Leads is >= 0 and < LeadCount && second - Vowels is >= 0 and < VowelCount)
        {
            return Syllables + ((((first - Leads) * VowelCount) + (second - Vowels)) * TrailCount);
        }

        var syllable = first - Syllables;
        return syllable is >= 0 and < LeadCount * VowelCount * TrailCount && syllable % TrailCount == 0 && second - Trails is > 0 and < TrailCount
            ? first + (second - Trails)
            : table.Composition(first, second);
    }
}
