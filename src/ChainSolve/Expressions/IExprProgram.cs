namespace ChainSolve.Expressions;

/// <summary>A list of expressions made ready to be evaluated together. Safe to share between threads.</summary>
internal interface IExprProgram
{
    /// <summary>The number of expressions.</summary>
    int OutputCount { get; }

    /// <summary>Evaluates all of them; conditions give 1 or 0. Division by zero gives NaN, and so does what is made of it.</summary>
    /// <param name="marking">One entry a variable; may be empty where no expression reads the state.</param>
    /// <param name="givens">One entry a given.</param>
    /// <param name="outputs">One entry an expression.</param>
    void Run(ReadOnlySpan<int> marking, ReadOnlySpan<double> givens, Span<double> outputs);
}
