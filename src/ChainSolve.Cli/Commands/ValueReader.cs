using System.Globalization;
using ChainSolve.Numerics.Absorption;
using ChainSolve.Numerics.Stationary;
using ChainSolve.Numerics.Transient;

namespace ChainSolve.Cli.Commands;

/// <summary>Reads the values of options.</summary>
internal static class ValueReader
{
    private static readonly (string Job, string[] Methods)[] Jobs =
    [
        ("transient", [.. TransientSolvers.All.Select(s => s.Name)]),
        ("stationary", [.. StationarySolvers.All.Select(s => s.Name)]),
        ("absorption", [.. AbsorptionSolvers.All.Select(s => s.Name)]),
    ];

    // Less than this the tool itself hardly fits in.
    private const double LeastMemory = 200e6;

    private static readonly (string Unit, double Bytes)[] MemoryUnits = [("MB", 1e6), ("GB", 1e9), ("TB", 1e12)];

    public static Setting Setting(string text)
    {
        var at = text.IndexOf('=', StringComparison.Ordinal);
        if (at <= 0 || at == text.Length - 1)
        {
            throw new UsageException($"'--set {text}' is not NAME=VALUE, for example --set mttr=\"4 h\"");
        }

        return new Setting(text[..at].Trim(), text[(at + 1)..].Trim());
    }

    public static IReadOnlyDictionary<string, string> Methods(string[] texts)
    {
        var methods = new Dictionary<string, string>(StringComparer.Ordinal);
        foreach (var text in texts)
        {
            var at = text.IndexOf('=', StringComparison.Ordinal);
            if (at <= 0 || at == text.Length - 1)
            {
                throw new UsageException($"'--method {text}' is not JOB=NAME, for example --method transient=uniformization");
            }

            var job = OneOf("--method", text[..at], [.. Jobs.Select(j => j.Job)]);
            var method = OneOf($"--method {job}=", text[(at + 1)..], Jobs.First(j => j.Job == job).Methods);
            if (!methods.TryAdd(job, method))
            {
                throw new UsageException($"'--method {job}=' is given twice");
            }
        }

        return methods;
    }

    public static double Positive(string option, string text, double below)
    {
        const NumberStyles styles = NumberStyles.AllowDecimalPoint | NumberStyles.AllowExponent | NumberStyles.AllowLeadingSign;
        if (double.TryParse(text, styles, CultureInfo.InvariantCulture, out var value) && value > 0 && value < below)
        {
            return value;
        }

        var range = below == double.MaxValue ? "above 0" : FormattableString.Invariant($"above 0 and below {below:R}");
        throw new UsageException($"'{option} {text}' is not a number {range}, for example {option} 1e-9");
    }

    public static long Whole(string option, string text, long low, long high)
    {
        if (long.TryParse(text.Replace("_", "", StringComparison.Ordinal), NumberStyles.None, CultureInfo.InvariantCulture, out var value)
            && value >= low && value <= high)
        {
            return value;
        }

        throw new UsageException(FormattableString.Invariant($"'{option} {text}' is not a whole number from {low} to {high}"));
    }

    /// <summary>A size in bytes.</summary>
    public static long Memory(string option, string text)
    {
        var trimmed = text.Trim();
        var unit = MemoryUnits.FirstOrDefault(u => trimmed.EndsWith(u.Unit, StringComparison.Ordinal));
        var number = unit.Unit is null ? "" : trimmed[..^unit.Unit.Length].TrimEnd();
        return double.TryParse(number, NumberStyles.AllowDecimalPoint, CultureInfo.InvariantCulture, out var value) && value * unit.Bytes is >= LeastMemory and < 1e18
            ? (long)(value * unit.Bytes)
            : throw new UsageException($"'{option} {text}' is not a size of 200 MB or more with its unit, for example {option} 500MB or {option} \"4 GB\"");
    }

    public static TimeSpan Duration(string option, string text)
    {
        var time = TimeText.Parse(option, text);
        if (time.Unit.Length == 0)
        {
            throw new UsageException($"'{option} {text}' needs a unit, for example {option} {text.Trim()}s");
        }

        // Timers of the platform end at about 24 days; nobody waits longer.
        var hours = Math.Min(time.Hours, 24 * 20);
        return hours > 0 ? TimeSpan.FromHours(hours) : throw new UsageException($"'{option} {text}' leaves no time");
    }

    public static string OneOf(string option, string text, string[] known)
    {
        if (known.Contains(text, StringComparer.Ordinal))
        {
            return text;
        }

        throw new UsageException($"'{option}' does not know '{text}'; known: {string.Join(", ", known)}{Hints.Nearest(text, known)}");
    }
}
