using System.Text;
using ChainSolve.Tests.Shared.Files;

namespace ChainSolve.Tests.Fuzz;

/// <summary>Makes texts that are nearly models, or nothing like one; the same number gives the same text.</summary>
internal sealed class BrokenTexts
{
    private static readonly string[] Pieces =
    [
        "model", "given", "let", "item", "counter", "event", "crew", "reward", "measure", "timebase", "states", "start", "named", "if", "then", "else",
        "and", "or", "not", "is", "at", "over", "until", "steady", "when", "while", "by", "rank", "ranked", "per", "step", "log", "time", "to", "x", "all", "any",
        "after", "mean", "erlang", "test", "phase", "study", "require", "spread", "uniform", "lognormal", "in", "rate", "each", "min", "max", "count", "choose",
        "probability", "expected", "average", "total", "reliability", "onset", "entries", "deviation", "quantile", "spell", "chance",
        "{", "}", "(", ")", "->", "..", ".", ",", ";", ":", "=", "!=", "<", "<=", ">", ">=", "+", "-", "*", "/", "^", "%", "#", "\n", "\r\n", "\n\n", " ", "\t",
        "0", "1", "2", "1e-3", "1e308", "1e999", "0.5", ".5", "5.", "0,5", "1_000", "9h", "h", "d", "y", "min", "FIT", "mo", "\"", "\"text\"", "\\", "\0", "é", "e\u0301", "𝛌", "≤", "\ud800", "\ufeff", "\u2028",
    ];

    private readonly string[] models =
    [
        .. Directory.GetFiles(Repository.PathOf("models"), "*.chain").Order(StringComparer.Ordinal).Select(f => File.ReadAllText(f)),
        """
        timebase d
        given lam = 2 per 1000 h in 1e-5 .. 1e-2 per h spread lognormal(2 per 1000 h, 3)
        let f(a, b) = if a > b then a * b else min(a, b) ^ 2
        crew hands = 1 ranked
        item va x 2 (r = lam * 2), vb x 3 { states ok, half, broken ; start ok
          ok -> half 0.25, broken 0.75 at r named fail { shelf = max(shelf - 1, 0) }
          half -> broken at 1 per 5 d when shelf > 0
          broken -> ok at 1/8 h by hands rank 1 }
        counter shelf 0 .. 3 start 3
        event restock at f(1, 2) per wk when shelf < 3 { shelf = shelf + 1 ; va: ok -> broken 0.5, half 0.5 x 2 if any }
        reward r in "EUR" { rate 5 per d * va.half while vb.ok > 0 ; each va.fail 3 }
        measure a = probability count(va.ok = 2, vb.ok = 2, shelf > 0) >= 2 at 1 d, 1 wk .. 3 wk step 1 wk, 1 d .. 100 d log 3
        measure q = quantile 50% time to va.ok = 0
        measure t = total (shelf while va.ok > 0) until vb.ok = 0
        """,
    ];

    /// <summary>A text, as bytes.</summary>
    public byte[] Make(int number)
    {
        var random = new Random(number);
        return random.Next(20) switch
        {
            0 => RandomBytes(random),
            1 => Encoding.UTF8.GetBytes(Soup(random)),
            2 => Encoding.UTF8.GetBytes(Nested(random)),
            3 => Scratched(random),
            _ => Encoding.UTF8.GetBytes(Mutated(random)),
        };
    }

    private static byte[] RandomBytes(Random random)
    {
        var bytes = new byte[random.Next(200)];
        random.NextBytes(bytes);
        return bytes;
    }

    private static string Soup(Random random) =>
        string.Concat(Enumerable.Range(0, random.Next(120)).Select(_ => Piece(random) + (random.Next(3) == 0 ? "" : " ")));

    private static string Nested(Random random)
    {
        string[] opens = ["(", "-", "not ", "if a then ", "min(", "2^", "(1 + ", "f(", "{", "\"", "count(a, "];
        var open = opens[random.Next(opens.Length)];
        var depth = random.Next(4) == 0 ? random.Next(20_000) : random.Next(300);
        return $"let a = {string.Concat(Enumerable.Repeat(open, depth))}1{new string(')', random.Next(2) * depth)}\nitem u {{ x -> y at a }}";
    }

    private byte[] Scratched(Random random)
    {
        var bytes = Encoding.UTF8.GetBytes(Window(random));
        for (var k = random.Next(1, 5); k > 0 && bytes.Length > 0; k--)
        {
            bytes[random.Next(bytes.Length)] = (byte)random.Next(256);
        }

        return bytes;
    }

    private string Mutated(Random random)
    {
        var text = new StringBuilder(Window(random));
        for (var k = random.Next(1, 9); k > 0; k--)
        {
            var at = random.Next(text.Length + 1);
            var length = Math.Min(random.Next(random.Next(2) == 0 ? 4 : 40), text.Length - at);
            switch (random.Next(6))
            {
                case 0:
                    text.Remove(at, length);
                    break;
                case 1:
                    text.Insert(at, text.ToString(at, length));
                    break;
                case 2:
                    var moved = text.ToString(at, length);
                    text.Remove(at, length).Insert(random.Next(text.Length + 1), moved);
                    break;
                case 3:
                    text.Length = at;
                    break;
                default:
                    text.Insert(at, Piece(random));
                    break;
            }
        }

        return text.ToString();
    }

    /// <summary>Some lines of a model, or all.</summary>
    private string Window(Random random)
    {
        var model = models[random.Next(models.Length)];
        if (random.Next(4) == 0)
        {
            return model;
        }

        var lines = model.Split('\n');
        var first = random.Next(lines.Length);
        return string.Join('\n', lines.Skip(first).Take(random.Next(1, 15)));
    }

    private static string Piece(Random random) => Pieces[random.Next(Pieces.Length)];
}
