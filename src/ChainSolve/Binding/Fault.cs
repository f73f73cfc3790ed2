using ChainSolve.Language.Diagnostics;
using ChainSolve.Language.Text;

namespace ChainSolve.Binding;

/// <summary>A fault or warning before it is put into the list.</summary>
/// <param name="Code">The code; see <see cref="BindingCodes"/>.</param>
/// <param name="Message">What is wrong, what was expected, and the mend.</param>
/// <param name="Span">The offending name or expression.</param>
internal sealed record Fault(string Code, string Message, TextSpan Span)
{
    /// <summary>Whether a plain number stands where one with a unit is needed.</summary>
    public bool LacksUnit { get; init; }

    /// <summary>
    /// What may have been meant; the end of the message. Looked for only when the fault is shown, since a text can have very
    /// many faults and very many names.
    /// </summary>
    public Func<string>? Hint { get; init; }

    public Diagnostic ToDiagnostic(SourceText source, Severity severity) =>
        new(Code, severity, Message + Hint?.Invoke(), Span, source);
}
