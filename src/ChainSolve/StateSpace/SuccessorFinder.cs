using System.Globalization;
using ChainSolve.Expressions;
using ChainSolve.Modelling;

namespace ChainSolve.StateSpace;

/// <summary>Finds what can happen in a state and where it leads. Holds buffers: belongs to one thread.</summary>
internal sealed class SuccessorFinder
{
    // Room for what solvers add to the sum of the rates out of a state.
    private const double LargestSum = 1e308;

    private readonly BoundModel model;
    private readonly double[] givens;
    private readonly IExprProgram rateProgram;
    private readonly EffectPlan[] plans;
    private readonly double[] rates;
    private readonly EffectRunner runner;

    public SuccessorFinder(BoundModel model, GivenValues givens, StateLayout layout, IExprProgram rateProgram, CancellationToken cancellation)
    {
        this.model = model;
        this.givens = givens.AsSpan().ToArray();
        this.rateProgram = rateProgram;
        plans = [.. model.Transitions.Select(t => new EffectPlan(t))];
        rates = new double[model.Transitions.Count];
        Successors = new SuccessorList(model.Variables.Count);
        runner = new EffectRunner(model, layout, this.givens, Successors, cancellation);
    }

    public SuccessorList Successors { get; }

    /// <summary>The effects of each transition.</summary>
    public IReadOnlyList<EffectPlan> Plans => plans;

    /// <summary>The rates of all transitions: 0 where the guard does not hold.</summary>
    public static IExprProgram RateProgram(BoundModel model, ExprBackEnd backEnd) => ExprCompiler.Compile(
        [.. model.Transitions.Select(t => t.Guard is null ? t.Rate : new ChooseNumberExpr(t.Guard, t.Rate, new ConstantExpr(0)))], backEnd);

    /// <summary>Fills <see cref="Successors"/>; those that lead back to the same state are among them.</summary>
    /// <exception cref="StateFaultException">Something that is enabled in the state is not possible.</exception>
    /// <exception cref="LimitExceededException">More is drawn in the state than fits into memory.</exception>
    public void Find(ReadOnlySpan<int> marking)
    {
        Successors.Clear();
        rateProgram.Run(marking, givens, rates);
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

            if (plans[t].Needs is { } needs && Has(marking, needs))
            {
                Successors.AddShift(rate, t);
            }
            else
            {
                runner.Run(plans[t], t, rate, marking);
            }
        }
    }

    private static bool Has(ReadOnlySpan<int> marking, (int Place, int Count)[] needs)
    {
        foreach (var (place, count) in needs)
        {
            if (marking[place] < count)
            {
                return false;
            }
        }

        return true;
    }
}
