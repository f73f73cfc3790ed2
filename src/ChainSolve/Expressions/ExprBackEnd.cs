namespace ChainSolve.Expressions;

/// <summary>How expressions are evaluated. All ways give the same digits.</summary>
internal enum ExprBackEnd
{
    /// <summary>Interpreted at first, and as a compiled method once that pays; where dynamic code is not compiled, interpreted throughout.</summary>
    Fastest,

    /// <summary>As a compiled method from the beginning.</summary>
    Compiled,

    /// <summary>By a loop over the instructions: nothing to compile.</summary>
    Interpreted,
}
