using System.Globalization;

namespace ChainSolve.Cli.Commands;

/// <summary>A time as it is written on the command line: a number and a unit, such as <c>10 h</c> or <c>30s</c>.</summary>
/// <param name="Number">The number; finite and not negative.</param>
/// <param name="Unit">The unit word; empty where none was written.</param>
internal readonly record struct TimeText(double Number, string Unit)
{
    private static readonly (string Unit, double Hours)[] Units =
    [
        ("ms", 1.0 / 3_600_000), ("s", 1.0 / 3600), ("min", 1.0 / 60), ("h", 1), ("d", 24), ("wk", 168), ("mo", 730), ("y", 8760),
    ];

    /// <summary>The length in hours; of a bare number the number itself.</summary>
    public double Hours => Unit.Length == 0 ? Number : Number * HoursOf(Unit)!.Value;

    /// <summary>Reads a time.</summary>
    /// <param name="option">The option it was given to, for messages.</param>
    /// <param name="text">The text.</param>
    /// <exception cref="UsageException">It is not a number, is negative, or the unit is not known.</exception>
    public static TimeText Parse(string option, string text)
    {
        var trimmed = text.Trim();
        var end = trimmed.Length;
        while (end > 0 && char.IsAsciiLetter(trimmed[end - 1]))
        {
            end--;
        }

        var unit = trimmed[end..];
        var number = trimmed[..end].TrimEnd().Replace("_", "", StringComparison.Ordinal);
        const NumberStyles styles = NumberStyles.AllowDecimalPoint | NumberStyles.AllowExponent | NumberStyles.AllowLeadingSign;
        if (!double.TryParse(number, styles, CultureInfo.InvariantCulture, out var value) || !double.IsFinite(value))
        {
            throw new UsageException($"'{option} {text}' is not a time; write a number with a unit, for example {option} \"10 h\"");
        }

        if (value < 0)
        {
            throw new UsageException($"'{option} {text}' is negative; times start at 0");
        }

        if (unit.Length > 0 && HoursOf(unit) is null)
        {
            var known = Units.Select(u => u.Unit).ToArray();
            throw new UsageException($"'{unit}' is not a unit of time; known: {string.Join(' ', known)}");
        }

        return new TimeText(value, unit);
    }

    /// <summary>The length in a model's unit of time.</summary>
    /// <param name="option">The option it was given to, for messages.</param>
    /// <param name="baseUnit">The model's unit; empty for a model without units.</param>
    /// <exception cref="UsageException">The time has a unit and the model none, or the other way round.</exception>
    public double In(string option, string baseUnit)
    {
        if (Number == 0)
        {
            return 0;
        }

        if (baseUnit.Length == 0)
        {
            return Unit.Length == 0 ? Number : throw new UsageException($"the model has no units; write {option} without '{Unit}'");
        }

        if (Unit.Length == 0)
        {
            throw new UsageException(FormattableString.Invariant($"{option} needs a unit, for example {option} \"{Number:R} {baseUnit}\""));
        }

        return Unit == baseUnit ? Number : Number * HoursOf(Unit)!.Value / HoursOf(baseUnit)!.Value;
    }

    private static double? HoursOf(string unit)
    {
        foreach (var (name, hours) in Units)
        {
            if (name == unit)
            {
                return hours;
            }
        }

        return null;
    }
}
