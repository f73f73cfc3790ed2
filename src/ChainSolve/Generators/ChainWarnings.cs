using System.Globalization;
using ChainSolve.Language.Diagnostics;
using ChainSolve.Language.Text;
using ChainSolve.Numerics.Structure;
using ChainSolve.StateSpace;

namespace ChainSolve.Generators;

/// <summary>What a reader should know of the states of a chain.</summary>
internal static class ChainWarnings
{
    public static IReadOnlyList<Diagnostic> Of(Chain chain, bool[] happens, CancellationToken cancellation)
    {
        var model = chain.Model;
        var warnings = new List<Diagnostic>();
        var place = model.Items.Count > 0 ? model.Items[0].Span : model.Counters[0].Span;
        for (var t = 0; t < happens.Length; t++)
        {
            if (!happens[t])
            {
                Warn(warnings, chain, StateCodes.NeverPossible, model.Transitions[t].Span, $"{model.Transitions[t].Label} is never possible in a state that the model reaches");
            }
        }

        var classes = ChainClasses.Of(chain.Generator, null, cancellation);
        var absorbing = classes.Absorbing.ToList();
        if (absorbing.Count > 0 && chain.Generator.StateCount > 1)
        {
            var first = chain.Describe(absorbing[0]);
            Warn(warnings, chain, StateCodes.CannotBeLeft, place, absorbing.Count == 1
                ? $"the state '{first}' cannot be left"
                : (FormattableString)$"{absorbing.Count:N0} states cannot be left, '{first}' the first of them");
        }

        if (classes.Recurrent.Count > 1)
        {
            Warn(warnings, chain, StateCodes.SeveralEnds, place, $"the model ends in one of {classes.Recurrent.Count:N0} sets of states that are never left again; long-run values weigh them by the chance of ending in each");
        }

        return [.. warnings.OrderBy(w => w.Span.Start)];
    }

    private static void Warn(List<Diagnostic> warnings, Chain chain, string code, TextSpan span, FormattableString message) =>
        warnings.Add(new Diagnostic(code, Severity.Warning, message.ToString(CultureInfo.InvariantCulture), span, chain.Model.Source));
}
