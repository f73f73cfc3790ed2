using System.Collections.Frozen;
using System.Globalization;

namespace ChainSolve.Language.Lexing;

/// <summary>What normal form C needs to know of characters, from the Unicode Character Database. Immutable; safe to share between threads.</summary>
internal sealed class NormalFormTable
{
    private const string Resource = "normal-forms.txt";

    private readonly FrozenDictionary<int, int[]> decompositions;
    private readonly FrozenDictionary<(int First, int Second), int> compositions;
    private readonly FrozenDictionary<int, int> classes;

    private NormalFormTable(Dictionary<int, int[]> decompositions, Dictionary<(int First, int Second), int> compositions, Dictionary<int, int> classes)
    {
        this.decompositions = decompositions.ToFrozenDictionary();
        this.compositions = compositions.ToFrozenDictionary();
        this.classes = classes.ToFrozenDictionary();
    }

    /// <summary>Reads the table that comes with this library.</summary>
    public static NormalFormTable Load()
    {
        using var stream = typeof(NormalFormTable).Assembly.GetManifestResourceStream(Resource)
            ?? throw new InvalidOperationException($"The resource {Resource} is missing.");
        using var reader = new StreamReader(stream);
        var decompositions = new Dictionary<int, int[]>();
        var compositions = new Dictionary<(int First, int Second), int>();
        var classes = new Dictionary<int, int>();
        while (reader.ReadLine() is { } line)
        {
            var words = line.Split(' ');
            switch (words[0])
            {
                case "D":
                    decompositions.Add(Hex(words[1]), [.. words.Skip(2).Select(Hex)]);
                    break;
                case "C":
                    compositions.Add((Hex(words[1]), Hex(words[2])), Hex(words[3]));
                    break;
                case "R":
                    for (var c = Hex(words[1]); c <= Hex(words[2]); c++)
                    {
                        classes.Add(c, int.Parse(words[3], CultureInfo.InvariantCulture));
                    }

                    break;
            }
        }

        return new NormalFormTable(decompositions, compositions, classes);
    }

    /// <summary>The full canonical decomposition; null where there is none.</summary>
    public int[]? Decomposition(int character) => decompositions.GetValueOrDefault(character);

    /// <summary>The character that two make; null where there is none.</summary>
    public int? Composition(int first, int second) => compositions.TryGetValue((first, second), out var whole) ? whole : null;

    /// <summary>The canonical combining class; 0 for characters that stand alone.</summary>
    public int ClassOf(int character) => classes.GetValueOrDefault(character);

    private static int Hex(string digits) => int.Parse(digits, NumberStyles.AllowHexSpecifier, CultureInfo.InvariantCulture);
}
