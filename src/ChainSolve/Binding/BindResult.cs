using ChainSolve.Language.Diagnostics;
using ChainSolve.Modelling;

namespace ChainSolve.Binding;

/// <summary>What binding a syntax tree gave.</summary>
/// <param name="Model">The model; null where there are faults.</param>
/// <param name="Diagnostics">Faults and warnings in the order of the text.</param>
internal sealed record BindResult(BoundModel? Model, IReadOnlyList<Diagnostic> Diagnostics);
