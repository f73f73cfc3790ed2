using ChainSolve.Numerics.Iteration;

namespace ChainSolve.Measures;

/// <summary>Measures that share their work.</summary>
internal abstract class MeasureGroup
{
    /// <summary>Solves all of them. One that alone fails has an answer that says so.</summary>
    /// <exception cref="NotConvergedException">The shared work failed.</exception>
    public abstract IReadOnlyList<MeasureAnswer> Solve(MeasureContext context);

    /// <summary>The same measures, each with work of its own.</summary>
    public abstract IReadOnlyList<MeasureGroup> Apart();

    /// <summary>The first measure.</summary>
    public abstract MeasureAsk First { get; }
}
