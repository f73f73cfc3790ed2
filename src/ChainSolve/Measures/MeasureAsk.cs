using ChainSolve.Modelling;

namespace ChainSolve.Measures;

/// <summary>A measure with what its givens decide.</summary>
/// <param name="Measure">The measure.</param>
/// <param name="Times">Its times in the time base, in the order as written; empty for a measure without times.</param>
/// <param name="Share">The share of a quantile, above 0 and at most 1; 0 for other kinds.</param>
internal sealed record MeasureAsk(BoundMeasure Measure, IReadOnlyList<double> Times, double Share);
