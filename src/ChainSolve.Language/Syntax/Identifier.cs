namespace ChainSolve.Language.Syntax;

/// <summary>A name as written.</summary>
public sealed record Identifier : SyntaxNode
{
    /// <summary>The name, in Unicode normal form C.</summary>
    public required string Text { get; init; }
}
