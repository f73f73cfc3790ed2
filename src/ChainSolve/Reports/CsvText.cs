using System.Reflection;

namespace ChainSolve.Reports;

/// <summary>Writes lines of comma-separated values (RFC 4180), with lines of remarks before them.</summary>
internal static class CsvText
{
    // What follows a plus tells the build, which does not belong into a record that has to compare equal.
    private static string Version =>
        typeof(CsvText).Assembly.GetCustomAttribute<AssemblyInformationalVersionAttribute>()!.InformationalVersion.Split('+')[0];

    /// <summary>The remarks that tell what the values belong to.</summary>
    /// <param name="writer">Where to.</param>
    /// <param name="model">The model, with the givens that were used.</param>
    /// <param name="command">What was asked; null for no such line.</param>
    public static void Head(TextWriter writer, Model model, string? command)
    {
        Remark(writer, $"model: {model.Title ?? model.Name}");
        Remark(writer, $"file: {model.Name}, sha256 {model.Fingerprint}");
        foreach (var given in model.Givens)
        {
            Remark(writer, $"given: {given.Name} = {NumberText.Full(given.Value)}{(given.Unit.Length == 0 ? "" : " ")}{given.Unit}");
        }

        Remark(writer, $"version: {Version}");
        if (command is not null)
        {
            Remark(writer, $"command: {command}");
        }
    }

    public static void Line(TextWriter writer, params IEnumerable<string> fields) =>
        writer.Write(string.Join(',', fields.Select(Field)) + "\n");

    /// <summary>A name with its unit in brackets.</summary>
    public static string Named(string name, string unit) => unit.Length == 0 ? name : $"{name} [{unit}]";

    private static void Remark(TextWriter writer, string text) => writer.Write($"# {text.ReplaceLineEndings(" ")}\n");

    private static string Field(string text) =>
        text.AsSpan().IndexOfAny(",\"\r\n") < 0 ? text : $"\"{text.Replace("\"", "\"\"", StringComparison.Ordinal)}\"";
}
