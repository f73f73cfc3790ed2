using ChainSolve.Numerics.Iteration;
using ChainSolve.Numerics.Operators;
using ChainSolve.Numerics.Structure;

namespace ChainSolve.Numerics.Absorption;

/// <summary>Setting up and solving.</summary>
public sealed partial class FirstPassage
{
    /// <summary>The highest moment that is supported.</summary>
    public const int MaxMoment = 4;

    /// <summary>Solves for the first time at which a chain leaves a set of states.</summary>
    /// <param name="generator">The chain.</param>
    /// <param name="start">The start distribution: one probability a state, adding to 1.</param>
    /// <param name="alive">True for the states of the set; one entry a state.</param>
    /// <param name="highestMoment">The highest moment that will be asked, 1 to 4; the variance needs 2. Each beyond 2 costs a further solve.</param>
    /// <param name="options">Which method to use; null to choose.</param>
    /// <param name="context">Cancellation, progress and accuracy; null for the default.</param>
    /// <exception cref="ArgumentException">The arguments do not fit together, or the method's name is unknown.</exception>
    /// <exception cref="OperationCanceledException">The context's token was cancelled.</exception>
    /// <exception cref="NotConvergedException">No method gave a value.</exception>
    public static FirstPassage Solve(
        Generator generator,
        double[] start,
        bool[] alive,
        int highestMoment = 1,
        SolverOptions? options = null,
        SolveContext? context = null)
    {
        StartCheck.Distribution(generator, start, nameof(start));
        StartCheck.Length(generator, alive, nameof(alive));
        ArgumentOutOfRangeException.ThrowIfLessThan(highestMoment, 1);
        ArgumentOutOfRangeException.ThrowIfGreaterThan(highestMoment, MaxMoment);
        options ??= SolverOptions.Default;
        context ??= SolveContext.Default;
        start = [.. start];
        alive = [.. alive];

        var reached = Reachability.From(generator, [.. start.Select(p => p > 0)], alive);
        var classes = ChainClasses.Of(generator, reached, context.Cancellation);
        var open = new bool[alive.Length];
        foreach (var i in classes.Transient)
        {
            open[i] = true;
        }

        var solved = SolveOpen(generator, start, open, highestMoment, options, context);
        foreach (var i in classes.Recurrent.SelectMany(c => c))
        {
            solved.Sojourns[i] = double.PositiveInfinity;
        }

        return new FirstPassage(generator, start, alive, open, classes.Recurrent, solved);
    }

    private static Solved SolveOpen(
        Generator generator, double[] start, bool[] open, int highestMoment, SolverOptions options, SolveContext context)
    {
        var moments = new double[]?[highestMoment];
        if (!open.Contains(true))
        {
            Array.Fill(moments, new double[start.Length]);
            return new Solved(new double[start.Length], 0, true, moments, "none", "no time is spent before the end", "nothing had to be solved");
        }

        var ones = Array.ConvertAll(open, o => o ? 1.0 : 0.0);
        var problem = new AbsorptionProblem
        {
            Generator = generator,
            Alive = open,
            Starts = [start],
            Rewards = highestMoment > 1 ? [ones] : [],
        };
        var (first, choice) = Attempts.First(
            AbsorptionSolvers.Rank(problem, options.Absorption, options.AbsorptionSolvers), s => s.Solve(problem, context), s => s.Name);
        var (bound, isProved) = (first.RelativeBound, first.IsProved);
        if (highestMoment > 1)
        {
            moments[0] = first.Earnings[0];
        }

        // The last moment is the sojourns times the vector before it, so the vectors end one earlier.
        for (var k = 2; k < highestMoment; k++)
        {
            var factor = k;
            var next = choice.Solver.Solve(
                problem with { Starts = [], Rewards = [Array.ConvertAll(moments[k - 2]!, m => factor * m)] }, context);
            moments[k - 1] = next.Earnings[0];
            (bound, isProved) = (Math.Max(bound, next.RelativeBound), isProved && next.IsProved);
        }

        return new Solved(first.Sojourns[0], bound, isProved, moments, choice.Solver.Name, first.How, choice.Why);
    }
}
