namespace ChainSolve.Numerics.Poisson;

/// <summary>By how much something changes at every later step, as a share of itself: between two numbers.</summary>
/// <param name="Low">The least; -0.01 for a loss of a hundredth.</param>
/// <param name="High">The most.</param>
internal readonly record struct Drift(double Low, double High)
{
    public double Width => High - Low;
}
