using ChainSolve.Language.Diagnostics;

namespace ChainSolve.Language.Text;

/// <summary>What reading bytes gave: a text, or the fault that kept it from being read.</summary>
/// <param name="Text">The text; null where there is a fault.</param>
/// <param name="Fault">The fault; null where there is a text.</param>
public sealed record SourceReading(SourceText? Text, Diagnostic? Fault);
