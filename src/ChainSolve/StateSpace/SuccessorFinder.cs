using System.Globalization;
using ChainSolve.Expressions;
using ChainSolve.Modelling;

namespace ChainSolve.StateSpace;

/// <summary>Finds what can happen in a state and where it leads. Holds buffers: belongs to one thread.</summary>
internal sealed class SuccessorFinder
{
    // Room for what solvers add to the sum of the rates out of a state.
    private const double LargestSum = 1e308;

    private readonly TransitionPlans plans;
    private readonly BoundModel model;
    private readonly double[] givens;
    private readonly double[] rates;
    private readonly EffectRunner runner;

    public SuccessorFinder(TransitionPlans plans, GivenValues givens, CancellationToken cancellation)
    {
        this.plans = plans;
        model = plans.Model;
        this.givens = givens.AsSpan().ToArray();
        rates = new double[model.Transitions.Count];
        Successors = new SuccessorList(model.Variables.Count);
        runner = new EffectRunner(model, plans.Layout, this.givens, Successors, cancellation);
    }

    public SuccessorList Successors { get; }

    /// <summary>By what the rate of a transition is multiplied for each target of the one replica that is drawn; 1 where none is.</summary>
    public double[] Factors(EffectPlan plan) => plan.Needs is null || plan.Drawn is null ? [1] : runner.Factors(plan, plan.Drawn);

    /// <summary>Fills <see cref="Successors"/>; those that lead back to the same state are among them.</summary>
    /// <exception cref="StateFaultException">Something that is enabled in the state is not possible.</exception>
    /// <exception cref="LimitExceededException">More is drawn in the state than fits into memory.</exception>
    public void Find(ReadOnlySpan<int> marking)
    {
        Successors.Clear();
        plans.Rates.Run(marking, givens, rates);
        var sum = 0.0;
        for (var t = 0; t < rates.Length; t++)
        {
            var rate = rates[t];
            if (rate == 0)
            {
                continue;
            }

            if (!(rate > 0) || double.IsInfinity(rate))
            {
                throw RateFaults.Of(model, t, rate, marking, givens);
            }

            sum += rate;
            if (sum > LargestSum)
            {
                throw new StateFaultException(StateCodes.Rate, model.Transitions[t], string.Create(
                    CultureInfo.InvariantCulture, $"with the rate of {model.Transitions[t].Label} the rates out of a state add to more than {LargestSum}; choose a shorter unit of time"));
            }

            if (plans.Effects[t] is { IsShift: true, Needs: { } needs } && Has(marking, needs))
            {
                Successors.AddShift(rate, t);
            }
            else
            {
                runner.Run(plans.Effects[t], t, rate, marking);
            }
        }
    }

    private static bool Has(ReadOnlySpan<int> marking, VariableRange[] needs)
    {
        foreach (var need in needs)
        {
            if (!need.Holds(marking))
            {
                return false;
            }
        }

        return true;
    }
}
