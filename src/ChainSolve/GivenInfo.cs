namespace ChainSolve;

/// <summary>An input of a model with its value. Immutable; safe to share between threads.</summary>
/// <param name="Name">The name.</param>
/// <param name="Value">The value, in <paramref name="Unit"/>.</param>
/// <param name="Unit">The unit in which the given was written, such as <c>per h</c>; empty for a plain number.</param>
public sealed record GivenInfo(string Name, double Value, string Unit);
