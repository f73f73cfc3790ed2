using System.Globalization;
using System.Text;
using ChainSolve.Language.Diagnostics;

namespace ChainSolve.Language.Text;

/// <summary>Makes a text from bytes: UTF-8, with or without a byte-order mark, up to 8 MiB.</summary>
/// <remarks>Safe to share between threads.</remarks>
public static class SourceReader
{
    /// <summary>The largest number of bytes that is read.</summary>
    public const int LargestSize = 8 * 1024 * 1024;

    private static readonly UTF8Encoding Strict = new(encoderShouldEmitUTF8Identifier: false, throwOnInvalidBytes: true);

    /// <summary>Reads bytes.</summary>
    /// <param name="name">The name shown in messages.</param>
    /// <param name="bytes">The bytes of the file.</param>
    public static SourceReading FromBytes(string name, ReadOnlySpan<byte> bytes)
    {
        ArgumentNullException.ThrowIfNull(name);
        if (bytes.Length > LargestSize)
        {
            return Fault(name, TextCodes.TooLarge, "the file has more than 8 MiB, the largest model that is read; split it, or write alike items with 'x COUNT'");
        }

        string content;
        try
        {
            content = Strict.GetString(bytes);
        }
        catch (DecoderFallbackException fault)
        {
            var line = bytes[..Math.Clamp(fault.Index, 0, bytes.Length)].Count((byte)'\n') + 1;
            return Fault(name, TextCodes.NotUtf8, string.Create(CultureInfo.InvariantCulture, $"the file is not UTF-8: byte {fault.Index + 1}, in line {line}, does not fit; save it as UTF-8"));
        }

        return string.IsNullOrWhiteSpace(content.TrimStart('\uFEFF'))
            ? Fault(name, TextCodes.Empty, "the file is empty; a model needs at least an item or a counter")
            : new SourceReading(new SourceText(name, content), null);
    }

    private static SourceReading Fault(string name, DiagnosticCode code, string message) =>
        new(null, new Diagnostic(code.Code, Severity.Fault, message, new TextSpan(0, 0), new SourceText(name, "")));
}
