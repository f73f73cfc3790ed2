namespace ChainSolve.Measures;

/// <summary>A measure with its verdict, and the answer that was judged.</summary>
internal sealed record JudgedMeasure(MeasureResult Result, MeasureAnswer Answer);
