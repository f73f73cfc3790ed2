using ChainSolve.Generators;
using ChainSolve.Numerics.Iteration;
using ChainSolve.Numerics.Timeline;

namespace ChainSolve.Measures;

/// <summary>What the solving of all measures shares. Immutable; safe to share between threads.</summary>
internal sealed record MeasureContext
{
    public MeasureContext(Chain chain, SolveOptions options, CancellationToken cancellation)
    {
        (Chain, Options) = (chain, options);
        Course = new Course([new Segment(chain.Generator, double.PositiveInfinity)], []);
        Solve = options.Context(cancellation);
        Solvers = options.Solvers();
    }

    public Chain Chain { get; }

    public SolveOptions Options { get; }

    /// <summary>What the chain goes through from time 0 on: one segment without an end, for all models so far.</summary>
    public Course Course { get; }

    public SolveContext Solve { get; }

    public SolverOptions Solvers { get; }
}
