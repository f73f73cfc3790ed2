namespace ChainSolve.Expressions;

/// <summary>How expressions are evaluated. Both ways give the same digits.</summary>
internal enum ExprBackEnd
{
    /// <summary>As a compiled method where dynamic code is compiled, interpreted elsewhere.</summary>
    Fastest,

    /// <summary>By a loop over the instructions: nothing to compile, for a few evaluations and where dynamic code is not available.</summary>
    Interpreted,
}
