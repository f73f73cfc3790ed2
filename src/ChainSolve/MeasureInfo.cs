namespace ChainSolve;

/// <summary>A measure that a model asks for. Immutable; safe to share between threads.</summary>
/// <param name="Name">The name.</param>
/// <param name="Kind">The kind, in the words of the notation: <c>probability</c>, <c>mean time</c>.</param>
/// <param name="Sentence">The measure as written, from its kind on.</param>
/// <param name="Unit">The unit of its values; empty for plain numbers.</param>
/// <param name="HasTimes">Whether its values belong to times.</param>
public sealed record MeasureInfo(string Name, string Kind, string Sentence, string Unit, bool HasTimes);
