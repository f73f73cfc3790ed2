namespace ChainSolve.Numerics.Kernels;

/// <summary>What a transition takes in a step, in operations of the kind that runs from registers.</summary>
/// <param name="Plain">In one double an element.</param>
/// <param name="Wide">In two doubles.</param>
internal readonly record struct StepCost(double Plain, double Wide);
