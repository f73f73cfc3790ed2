using ChainSolve.Language.Text;

namespace ChainSolve.Language.Syntax;

/// <summary>A whole model text as a tree.</summary>
/// <remarks>Immutable; safe to share between threads.</remarks>
public sealed record ModelSyntax
{
    /// <summary>The text.</summary>
    public required SourceText Source { get; init; }

    /// <summary>The statements that could be read, in order.</summary>
    public required IReadOnlyList<StatementSyntax> Statements { get; init; }

    /// <summary>The names that stand in statements that could not be read, and may be declared there; null where everything was read.</summary>
    public IReadOnlySet<string>? UnreadNames { get; init; }

    /// <summary>The comments, in order, <c>#</c> included.</summary>
    public required IReadOnlyList<TextSpan> Comments { get; init; }
}
