using ChainSolve.Language.Diagnostics;
using ChainSolve.Language.Text;

namespace ChainSolve.Language.Parsing;

/// <summary>
/// Ends the reading of one statement with a fault of its own. Thrown and caught inside the parser: where many alternatives
/// lead to one place, an exception keeps the one message that fits, which merged results would lose.
/// </summary>
internal sealed class SyntaxFaultException(DiagnosticCode code, TextSpan span, string message) : Exception(message)
{
    public DiagnosticCode Code { get; } = code;

    public TextSpan Span { get; } = span;
}
