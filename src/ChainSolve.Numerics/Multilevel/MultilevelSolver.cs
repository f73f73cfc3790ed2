using ChainSolve.Numerics.Iteration;
using ChainSolve.Numerics.Operators;
using ChainSolve.Numerics.Stationary;

namespace ChainSolve.Numerics.Multilevel;

/// <summary>Multilevel aggregation, for large chains whose rates differ widely or whose parts are loosely coupled.</summary>
/// <remarks>
/// <see cref="AggregationCycle"/> has the method and its sources, <see cref="CycleWatch"/> how the error is judged. The
/// bound is estimated.
/// </remarks>
internal sealed class MultilevelSolver : IStationarySolver
{
    // The first groups are made of a guess; these many cycles later the flows are known well enough to group anew.
    private const int FirstCycles = 3;

    // Cycles that shrink the change by less than this get other groups and more sweeps now and then.
    private const double Slow = 0.85;
    private const int SlowCycles = 12;
    private const int MaxSmoothings = 16;
    private const int MaxCycles = 400;
    private const int MaxProbes = 100;

    public string Name => "multilevel";

    public double Cost(Generator generator) => generator.StateCount == 1 ? 1 : 2000.0 * (generator.TransitionCount + generator.StateCount);

    public StationaryVector Solve(Generator generator, SolveContext context)
    {
        if (Normalised.Trivial(generator) is { } single)
        {
            return single;
        }

        var cancellation = context.Cancellation;
        cancellation.ThrowIfCancellationRequested();
        var finest = new FlowLevel(generator.Columns, generator.ExitRates, TreeGuess.Of(generator));
        finest.Sweep(false, cancellation);
        finest.Sweep(true, cancellation);
        var (grouped, smoothings) = (0, 1);
        var cycle = new AggregationCycle(finest, smoothings, cancellation);
        var watch = new CycleWatch(generator);
        while (!watch.IsDone && watch.Cycles < MaxCycles)
        {
            watch.Step(finest, () => cycle.Run(cancellation));
            finest.Rescale();
            context.Progress?.Report(new SolveProgress(Name, watch.Cycles, 0, $"error about {watch.Error:G2}"));
            var isSlow = !watch.IsDone && (watch.IsUndone || (watch.Cycles - grouped >= SlowCycles && watch.Contraction > Slow));
            if (watch.Cycles == FirstCycles || isSlow)
            {
                smoothings = isSlow ? Math.Min(2 * smoothings, MaxSmoothings) : 1;
                cycle = new AggregationCycle(finest, smoothings, cancellation);
                grouped = watch.Cycles;
            }
        }

        if (watch.IsDone)
        {
            watch.Probe(finest, cycle.Disturb, () => cycle.Run(cancellation), MaxProbes);
        }

        if (!watch.IsDone || !(watch.Error <= 1e-3 * Math.Min(1, context.Tolerance * 1e6)))
        {
            throw new NotConvergedException(
                $"After {watch.Cycles} cycles of {Name} over {generator.StateCount} states the weights change by {watch.Change:G2} in a cycle; " +
                $"of an error {watch.Contraction:G3} is left after one.");
        }

        return Normalised.Estimated(
            finest.Weights,
            watch.Error,
            $"{watch.Cycles} cycles of {Name} on {cycle.LevelCount} levels, contraction {watch.Contraction:G3} a cycle");
    }
}
