using ChainSolve.Language.Diagnostics;
using ChainSolve.Modelling;

namespace ChainSolve.Binding;

/// <summary>The values of all givens, or what is wrong with them.</summary>
/// <param name="Values">The values; null where there are faults.</param>
/// <param name="Faults">In the order of the settings, then of the model.</param>
/// <param name="Echoes">For each setting without a unit how it was read: <c>mttr = 12 h</c>.</param>
internal sealed record GivenResolution(GivenValues? Values, IReadOnlyList<Diagnostic> Faults, IReadOnlyList<string> Echoes);
