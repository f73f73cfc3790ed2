using System.Globalization;
using ChainSolve.Expressions;
using ChainSolve.Modelling;

namespace ChainSolve.StateSpace;

/// <summary>Tells why a rate cannot be used in a state.</summary>
internal static class RateFaults
{
    /// <param name="model">The model.</param>
    /// <param name="transition">The number of the transition whose rate was met.</param>
    /// <param name="rate">What its rate came to: negative, infinite or not a number.</param>
    /// <param name="marking">The state.</param>
    /// <param name="givens">The values of the givens.</param>
    public static StateFaultException Of(BoundModel model, int transition, double rate, ReadOnlySpan<int> marking, double[] givens)
    {
        var told = model.Transitions[transition];
        if (!double.IsNaN(rate))
        {
            return new StateFaultException(
                StateCodes.Rate, told, string.Create(CultureInfo.InvariantCulture, $"the rate of {told.Label} is {rate}; a rate is finite and not negative"));
        }

        // A condition without a value takes the value of all rates that share its crew, so that it is looked for first.
        var culprit = WithoutCondition(model, marking, givens);
        return culprit is null
            ? new StateFaultException(StateCodes.Rate, told, $"the rate of {told.Label} has no value; look for a division by zero")
            : new StateFaultException(StateCodes.Rate, culprit, $"the condition of {culprit.Label} has no value; look for a division by zero in it");
    }

    private static BoundTransition? WithoutCondition(BoundModel model, ReadOnlySpan<int> marking, double[] givens)
    {
        Span<double> truth = stackalloc double[1];
        foreach (var transition in model.Transitions)
        {
            if (transition.Guard is { } guard)
            {
                ExprCompiler.Compile([guard], ExprBackEnd.Interpreted).Run(marking, givens, truth);
                if (double.IsNaN(truth[0]))
                {
                    return transition;
                }
            }
        }

        return null;
    }
}
