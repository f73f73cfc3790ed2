using System.Globalization;

namespace ChainSolve.Language.Lexing;

/// <summary>Reads numbers: digits on both sides of a dot, <c>_</c> between digits, an exponent.</summary>
internal static class NumberScanner
{
    /// <summary>The offset behind the number that starts at an offset, where a digit stands.</summary>
    public static int EndOf(string text, int start)
    {
        var at = SkipDigits(text, start);
        if (at + 1 < text.Length && text[at] == '.' && char.IsAsciiDigit(text[at + 1]))
        {
            at = SkipDigits(text, at + 1);
        }

        if (at < text.Length && text[at] is 'e' or 'E')
        {
            var digits = at + 1;
            if (digits < text.Length && text[digits] is '+' or '-')
            {
                digits++;
            }

            if (digits < text.Length && char.IsAsciiDigit(text[digits]))
            {
                at = SkipDigits(text, digits);
            }
        }

        return at;
    }

    /// <summary>The value of a number as <see cref="EndOf"/> delimits it; infinite where it is too large for a double.</summary>
    public static double ValueOf(ReadOnlySpan<char> number)
    {
        Span<char> digits = number.Length <= 128 ? stackalloc char[number.Length] : new char[number.Length];
        var length = 0;
        foreach (var c in number)
        {
            if (c != '_')
            {
                digits[length++] = c;
            }
        }

        return double.Parse(digits[..length], NumberStyles.Float, CultureInfo.InvariantCulture);
    }

    private static int SkipDigits(string text, int at)
    {
        while (at < text.Length && (char.IsAsciiDigit(text[at]) || (text[at] == '_' && at + 1 < text.Length && char.IsAsciiDigit(text[at + 1]))))
        {
            at++;
        }

        return at;
    }
}
