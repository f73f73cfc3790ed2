using System.Globalization;
using ChainSolve.Language.Diagnostics;
using ChainSolve.Modelling;

namespace ChainSolve.StateSpace;

/// <summary>Tells faults that a state shows: what, in which state, and how that is reached.</summary>
internal static class StateFaults
{
    private const int StepsShown = 8;

    public static ModelFaultsException Tell(BoundModel model, StateFaultException fault, ReadOnlySpan<int> marking, IReadOnlyList<string> way)
    {
        var reached = way.Count == 0 ? "where the model starts" : $"reached by: {Steps(way)}";
        var message = $"{fault.Message} (in the state '{StateWords.Describe(model, marking)}', {reached})";
        return new ModelFaultsException([new Diagnostic(fault.Code, Severity.Fault, message, fault.Transition.Span, model.Source)]);
    }

    // Steps that follow on themselves are told once with their number.
    private static string Steps(IReadOnlyList<string> way)
    {
        var steps = new List<(string Label, int Times)>();
        foreach (var label in way)
        {
            if (steps.Count > 0 && steps[^1].Label == label)
            {
                steps[^1] = (label, steps[^1].Times + 1);
            }
            else
            {
                steps.Add((label, 1));
            }
        }

        var shown = steps.Select(s => s.Times == 1 ? s.Label : string.Create(CultureInfo.InvariantCulture, $"{s.Label} ({s.Times} times)")).ToList();
        if (shown.Count > StepsShown)
        {
            shown.RemoveRange(StepsShown - 1, shown.Count - StepsShown);
            shown.Insert(StepsShown - 1, "…");
        }

        return string.Join(", ", shown);
    }
}
