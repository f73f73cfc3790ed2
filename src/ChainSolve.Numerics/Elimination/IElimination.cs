using ChainSolve.Numerics.Arithmetic;

namespace ChainSolve.Numerics.Elimination;

/// <summary>
/// A chain whose states were eliminated one by one without a subtraction. The pivot of a state is the sum of its
/// remaining rates and of its rate to the end (Grassmann, Taksar and Heyman, Oper. Res. 33 (1985) 1107-1116; with a
/// rate to the end, Alfa, Xue and Ye, Math. Comp. 71 (2002); both from memory).
/// </summary>
internal interface IElimination
{
    /// <summary>
    /// A bound on the relative error of every entry of every solution, the rounding to double not included. Roundings
    /// at one step act like relative changes of the rates of the chain that is left, and by the Markov chain tree
    /// theorem a relative change e of all rates of k states changes each entry by at most 2ke.
    /// </summary>
    double RelativeBound { get; }

    /// <summary>The stationary vector up to a factor; only of a chain without rates to the end.</summary>
    WideNumber[] Stationary();

    /// <summary>The sojourn times x with x(-S) = start.</summary>
    WideNumber[] Sojourns(double[] start);

    /// <summary>The earnings m with (-S)m = rewards.</summary>
    WideNumber[] Earnings(double[] rewards);
}
