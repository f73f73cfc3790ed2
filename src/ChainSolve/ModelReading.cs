using ChainSolve.Language.Diagnostics;

namespace ChainSolve;

/// <summary>What reading a model gave. Immutable; safe to share between threads.</summary>
/// <param name="Model">The model; null where it has faults.</param>
/// <param name="Diagnostics">The faults and warnings, in the order of the text; empty if there are none.</param>
public sealed record ModelReading(Model? Model, IReadOnlyList<Diagnostic> Diagnostics);
