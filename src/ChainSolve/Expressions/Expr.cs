namespace ChainSolve.Expressions;

/// <summary>
/// A typed expression over the givens of a model and the marking of a state: the one form of rates, guards, counts,
/// probabilities, rewards and conditions once names and units are resolved. Numbers are in the model's time base.
/// </summary>
/// <remarks>
/// Immutable; safe to share between threads. Expressions form a graph: where a <c>let</c> is used twice, both places
/// hold the same object, and evaluators visit it once. Conditions and numbers are kept apart by type
/// (<see cref="NumberExpr"/>, <see cref="ConditionExpr"/>).
/// </remarks>
internal abstract class Expr;

/// <summary>An expression whose value is a number.</summary>
internal abstract class NumberExpr : Expr;

/// <summary>An expression whose value is true or false.</summary>
internal abstract class ConditionExpr : Expr;
