namespace ChainSolve.Numerics.Kernels;

/// <summary>What turns rates into a step of the uniformized chain: y = (x (q - exit rate) + Σ rate × x of the source) / q.</summary>
/// <param name="Stays">High parts of q less the exit rate, with room for eight more; 0 for states that do not count.</param>
/// <param name="StaysLow">Low parts; empty where vectors are of one double.</param>
/// <param name="Inverse">1/q.</param>
internal sealed record StepScale(double[] Stays, double[] StaysLow, double Inverse)
{
    /// <summary>Elements below this are dropped, and counted.</summary>
    public const double Flushed = 1e-300;
}
