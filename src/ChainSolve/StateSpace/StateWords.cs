using System.Globalization;
using ChainSolve.Modelling;

namespace ChainSolve.StateSpace;

/// <summary>Markings in the model's own words.</summary>
internal static class StateWords
{
    /// <summary><c>pump: up 2, down 1; valve: open; stock = 3</c>; places without replicas are left out.</summary>
    public static string Describe(BoundModel model, ReadOnlySpan<int> marking)
    {
        var parts = new List<string>();
        foreach (var item in model.Items)
        {
            var places = new List<string>();
            for (var s = 0; s < item.States.Count; s++)
            {
                var count = marking[item.FirstVariable + s];
                if (count > 0)
                {
                    places.Add(item.IsReplicated ? string.Create(CultureInfo.InvariantCulture, $"{item.States[s]} {count}") : item.States[s]);
                }
            }

            if (places.Count > 0)
            {
                parts.Add($"{item.Name}: {string.Join(", ", places)}");
            }
        }

        foreach (var counter in model.Counters)
        {
            parts.Add(string.Create(CultureInfo.InvariantCulture, $"{counter.Name} = {marking[counter.Variable]}"));
        }

        return parts.Count == 0 ? "the only state" : string.Join("; ", parts);
    }
}
