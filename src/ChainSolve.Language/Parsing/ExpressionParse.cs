using ChainSolve.Language.Diagnostics;
using ChainSolve.Language.Syntax;

namespace ChainSolve.Language.Parsing;

/// <summary>What reading a lone expression gave.</summary>
/// <param name="Expression">The expression; null where there are faults.</param>
/// <param name="Diagnostics">The faults in the order of the text; empty if there is none.</param>
public sealed record ExpressionParse(ExpressionSyntax? Expression, IReadOnlyList<Diagnostic> Diagnostics);
