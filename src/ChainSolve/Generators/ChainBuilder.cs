using System.Globalization;
using ChainSolve.Language.Diagnostics;
using ChainSolve.Language.Text;
using ChainSolve.Modelling;
using ChainSolve.Numerics.Iteration;
using ChainSolve.Numerics.Operators;
using ChainSolve.StateSpace;

namespace ChainSolve.Generators;

/// <summary>Makes a Markov chain of a model whose givens are set.</summary>
internal static class ChainBuilder
{
    private const int WidestKey = 128;

    /// <summary>Explores the model and fills its generator.</summary>
    /// <exception cref="ModelFaultsException">A state shows a fault.</exception>
    /// <exception cref="LimitExceededException">There are more states than allowed, or they take more memory.</exception>
    public static ExploredChain Build(BoundModel model, GivenValues givens, ExploreOptions options, SolveContext context)
    {
        var layout = StateLayout.Of(model, givens);
        if (layout.Bits > WidestKey)
        {
            throw new ModelFaultsException([new Diagnostic(
                StateCodes.KeyTooWide,
                Severity.Fault,
                $"a state of this model takes {layout.Bits} bits, and {WidestKey} is the most that is kept; write alike items as one item with 'x N', or narrow the ranges of counters",
                new TextSpan(0, 0),
                model.Source)]);
        }

        var plans = new TransitionPlans(model, layout, options.BackEnd);
        var starts = StartMarkings.Of(model, givens, options.MaxStates);
        var limits = new ExploreLimits(options.MaxStates, options.MaxMemory);
        var states = layout.Bits <= 64
            ? Explorer<ulong>.Explore(new SuccessorKeys<ulong>(plans), givens, starts, limits, context)
            : Explorer<UInt128>.Explore(new SuccessorKeys<UInt128>(plans), givens, starts, limits, context);
        if (states.TransitionCount > Array.MaxLength)
        {
            throw new LimitExceededException("transitions", string.Create(
                CultureInfo.InvariantCulture,
                $"the {states.Count:N0} states of the model have {states.TransitionCount:N0} transitions, and {Array.MaxLength:N0} is the most that is kept; write alike things as one item with 'x N'"));
        }

        var rows = new RowFiller(states, givens, null, context).Fill()
            ?? throw new InvalidOperationException("A state leads to one that was not explored.");
        var generator = Generator.FromRows(rows.Offsets, rows.Targets, rows.Rates, context.Cancellation);
        return new ExploredChain(model, givens, options, starts, states, rows, generator, isRefilled: false, context.Cancellation);
    }

    /// <summary>
    /// The chain of the same model for other values of its givens: the same states with new rates where no given that shapes them changed and
    /// the same transitions are possible, explored anew otherwise. Both ways give the same chain, digit for digit.
    /// </summary>
    public static ExploredChain Rebuild(ExploredChain chain, GivenValues givens, ExploreOptions options, SolveContext context) =>
        Refill(chain, givens, options, context) ?? Build(chain.Model, givens, options, context);

    private static ExploredChain? Refill(ExploredChain chain, GivenValues givens, ExploreOptions options, SolveContext context)
    {
        var model = chain.Model;
        for (var i = 0; i < model.Givens.Count; i++)
        {
            if (model.Givens[i].ShapesStates && givens[i] != chain.Givens[i])
            {
                return null;
            }
        }

        try
        {
            var rows = new RowFiller(chain.States, givens, chain.Rows, context).Fill();
            return rows is not null
                ? new ExploredChain(
                    model,
                    givens,
                    options,
                    StartMarkings.Of(model, givens, options.MaxStates),
                    chain.States,
                    rows,
                    chain.Generator.WithRates(rows.Rates),
                    isRefilled: true,
                    context.Cancellation)
                : null;
        }
        catch (StateFaultException)
        {
            // Exploring tells the fault with the way to it, or does not meet it at all.
            return null;
        }
    }
}
