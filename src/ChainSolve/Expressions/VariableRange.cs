namespace ChainSolve.Expressions;

/// <summary>The values of a variable under which something may happen, ends included.</summary>
internal readonly record struct VariableRange(int Variable, int Least, int Most)
{
    /// <summary>Whether the marking keeps to it.</summary>
    public bool Holds(ReadOnlySpan<int> marking) => marking[Variable] >= Least && marking[Variable] <= Most;
}
