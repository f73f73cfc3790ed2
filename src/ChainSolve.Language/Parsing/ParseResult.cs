using ChainSolve.Language.Diagnostics;
using ChainSolve.Language.Syntax;

namespace ChainSolve.Language.Parsing;

/// <summary>What reading a text gave: the tree of what could be read, and what was wrong.</summary>
/// <param name="Model">The tree; statements with faults are left out.</param>
/// <param name="Diagnostics">The faults and warnings in the order of the text; empty if there is none.</param>
public sealed record ParseResult(ModelSyntax Model, IReadOnlyList<Diagnostic> Diagnostics);
