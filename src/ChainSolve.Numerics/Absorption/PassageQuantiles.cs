using ChainSolve.Numerics.Arithmetic;
using ChainSolve.Numerics.Estimates;
using ChainSolve.Numerics.Iteration;
using ChainSolve.Numerics.Operators;
using ChainSolve.Numerics.Structure;
using ChainSolve.Numerics.Transient;

namespace ChainSolve.Numerics.Absorption;

/// <summary>
/// Quantiles of the time until a chain leaves a set of states: the first time by which the chance of having left has
/// reached a share.
/// </summary>
/// <remarks>
/// The distribution of the time rises, so that two times whose chances lie surely below and surely above the share enclose
/// the quantile; Newton's steps on the distribution, kept between the two, bring them together. Safe to share between threads.
/// </remarks>
public static class PassageQuantiles
{
    /// <summary>Finds a quantile.</summary>
    /// <param name="generator">The chain.</param>
    /// <param name="start">The start distribution: one probability a state, adding to 1. Mass outside of the set has left at time 0.</param>
    /// <param name="alive">True for the states of the set; one entry a state.</param>
    /// <param name="share">The share, above 0 and at most 1.</param>
    /// <param name="method">The name of the transient method; null to choose.</param>
    /// <param name="solvers">The transient methods to choose from; null for those of this library.</param>
    /// <param name="options">Which method to use for the chance of ever leaving; null to choose.</param>
    /// <param name="context">Cancellation, progress and accuracy; null for the default.</param>
    /// <exception cref="ArgumentException">The arguments do not fit together, or a method's name is unknown.</exception>
    /// <exception cref="NotConvergedException">No value could be given; the message says why.</exception>
    /// <exception cref="OperationCanceledException">The context's token was cancelled.</exception>
    public static PassageQuantile Find(
        Generator generator,
        double[] start,
        bool[] alive,
        double share,
        string? method = null,
        IReadOnlyList<ITransientSolver>? solvers = null,
        SolverOptions? options = null,
        SolveContext? context = null)
    {
        StartCheck.Distribution(generator, start, nameof(start));
        StartCheck.Length(generator, alive, nameof(alive));
        if (!(share > 0) || share > 1)
        {
            throw new ArgumentOutOfRangeException(nameof(share), share, "A share is above 0 and at most 1.");
        }

        context ??= SolveContext.Default;
        LongSum outside = default;
        LongSum inside = default;
        for (var i = 0; i < start.Length; i++)
        {
            outside.Add(alive[i] ? 0 : start[i]);
            inside.Add(alive[i] ? start[i] : 0);
        }

        var chance = ChanceOfLeaving(generator, start, alive, options, context);
        if (inside.Value == 0 || outside.Value >= share)
        {
            return new PassageQuantile(Estimate.Zero, chance, "none", "nothing had to be solved", "the share has left at the start");
        }

        if (chance.Value + chance.Bound < share || (share == 1 && inside.Value > 0))
        {
            return new PassageQuantile(Estimate.Infinite, chance, "none", "nothing had to be solved", "from the chance of ever leaving");
        }

        if (chance.Value - chance.Bound <= share && chance.Value != 1)
        {
            throw new NotConvergedException(
                $"The chance of ever leaving, {chance.Value:R} to within {chance.Bound:G2}, cannot be told from the share {share:R}.");
        }

        var distribution = new PassageDistribution(generator, start, alive, share, method, solvers, context);
        var search = new QuantileSearch(distribution, context.Cancellation);
        var time = search.Run();
        return new PassageQuantile(time, chance, distribution.Method, distribution.Why, $"{search.How}; {distribution.How}");
    }

    private static Estimate ChanceOfLeaving(Generator generator, double[] start, bool[] alive, SolverOptions? options, SolveContext context)
    {
        var reached = Reachability.From(generator, [.. start.Select(p => p > 0)], alive);
        return ChainClasses.Of(generator, reached, context.Cancellation).Recurrent.Count == 0
            ? Estimate.Exact(1)
            : FirstPassage.Solve(generator, start, alive, 1, options, context).ChanceOfLeaving;
    }
}
