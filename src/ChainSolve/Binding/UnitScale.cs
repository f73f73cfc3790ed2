using ChainSolve.Modelling;

namespace ChainSolve.Binding;

/// <summary>
/// What a unit makes of a number, in the model's time base: times <paramref name="Multiply"/>, divided by
/// <paramref name="Divide"/>. Kept apart, because both are whole numbers mostly and so cost one rounding at most.
/// </summary>
internal readonly record struct UnitScale(double Multiply, double Divide, int TimePower)
{
    private static readonly (string Word, long Milliseconds)[] Times =
    [
        ("ms", 1),
        ("s", 1_000),
        ("min", 60_000),
        ("h", 3_600_000),
        ("d", 24 * 3_600_000L),
        ("wk", 168 * 3_600_000L),
        ("mo", 730 * 3_600_000L),
        ("y", 8760 * 3_600_000L),
    ];

    public static IEnumerable<string> TimeWords => Times.Select(t => t.Word);

    /// <summary>The scale behind a number: <c>9 h</c>, <c>5 %</c>, <c>500 FIT</c>; null for an unknown word.</summary>
    public static UnitScale? Of(string word, TimeBase timeBase)
    {
        if (word == "%")
        {
            return new UnitScale(1, 100, 0);
        }

        if (word == "FIT")
        {
            // One failure in 1e9 hours.
            var perHour = Of("h", timeBase)!.Value;
            return new UnitScale(perHour.Divide, perHour.Multiply * 1e9, -1);
        }

        if (Milliseconds(word) is not { } unit)
        {
            return null;
        }

        var whole = Milliseconds(timeBase.Unit) ?? Milliseconds("h")!.Value;
        var divisor = GreatestCommonDivisor(unit, whole);
        return new UnitScale((double)unit / divisor, (double)whole / divisor, 1);
    }

    /// <summary>The scale of <c>per [count] UNIT</c>; null for an unknown word.</summary>
    public static UnitScale? Per(double count, string word, TimeBase timeBase) =>
        Of(word, timeBase) is { } unit ? new UnitScale(unit.Divide, count * unit.Multiply, -unit.TimePower) : null;

    public static TimeBase? TimeBaseOf(string word) =>
        Milliseconds(word) is { } length ? new TimeBase(word, length / 3_600_000.0) : null;

    public double Apply(double number) => number * Multiply / Divide;

    private static long? Milliseconds(string word)
    {
        foreach (var (name, length) in Times)
        {
            if (name == word)
            {
                return length;
            }
        }

        return null;
    }

    private static long GreatestCommonDivisor(long a, long b)
    {
        while (b != 0)
        {
            (a, b) = (b, a % b);
        }

        return a;
    }
}
