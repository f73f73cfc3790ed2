namespace ChainSolve.Numerics.Kernels;

/// <summary>Takes a step of a uniformized chain for a range of states.</summary>
/// <remarks>
/// All kernels do the same operations in the same order on each element, so that they give the same digits. Elements of
/// states that do not count are zero and stay so. Safe to share between threads that write different ranges.
/// </remarks>
internal interface IStepKernel
{
    /// <summary>What a transition takes.</summary>
    StepCost Cost { get; }

    /// <summary>A step in one double an element.</summary>
    /// <param name="vectors">What is read and written.</param>
    /// <param name="scale">The scaling.</param>
    /// <param name="first">The first state; a multiple of <see cref="StepVectors.Lanes"/>.</param>
    /// <param name="last">One behind the last state; a multiple of the same, or the number of states.</param>
    StepTally Plain(StepVectors vectors, StepScale scale, int first, int last);

    /// <summary>A step in two doubles an element.</summary>
    /// <param name="vectors">What is read and written.</param>
    /// <param name="scale">The scaling.</param>
    /// <param name="first">The first state, as for <see cref="Plain"/>.</param>
    /// <param name="last">One behind the last state, as for <see cref="Plain"/>.</param>
    StepTally Wide(StepVectors vectors, StepScale scale, int first, int last);
}
