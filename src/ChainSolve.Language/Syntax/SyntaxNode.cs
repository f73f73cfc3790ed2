using ChainSolve.Language.Text;

namespace ChainSolve.Language.Syntax;

/// <summary>A node of the syntax tree. Immutable; safe to share between threads.</summary>
public abstract record SyntaxNode
{
    /// <summary>The text that the node was read from.</summary>
    public required TextSpan Span { get; init; }
}
