namespace ChainSolve.Numerics.Estimates;

/// <summary>How a solver ended.</summary>
public enum SolveStatus
{
    /// <summary>The accuracy wanted was reached.</summary>
    Ok,

    /// <summary>A value and its bound are given; the bound is wider than wanted.</summary>
    Short,

    /// <summary>No value could be given; the reason says why.</summary>
    Failed,
}
