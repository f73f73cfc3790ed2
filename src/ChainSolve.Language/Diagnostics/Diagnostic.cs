using ChainSolve.Language.Text;

namespace ChainSolve.Language.Diagnostics;

/// <summary>One fault or warning about a model text: what, where, and how to mend it.</summary>
/// <remarks>Immutable; safe to share between threads.</remarks>
/// <param name="Code">Stable code; its letter tells the stage: L text, B meaning, S states, N numerics.</param>
/// <param name="Severity">Fault or warning.</param>
/// <param name="Message">One sentence without a full stop: what is wrong, what was expected, and the mend.</param>
/// <param name="Span">The place in the text.</param>
/// <param name="Source">The text that <paramref name="Span"/> refers to.</param>
public sealed record Diagnostic(string Code, Severity Severity, string Message, TextSpan Span, SourceText Source)
{
    /// <summary>Where the span starts, as line and column.</summary>
    public TextPosition Position => Source.PositionOf(Span.Start);
}
