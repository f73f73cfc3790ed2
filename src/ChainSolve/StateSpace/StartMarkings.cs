using System.Globalization;
using ChainSolve.Binding;
using ChainSolve.Modelling;

namespace ChainSolve.StateSpace;

/// <summary>The markings in which a model may start, with their probabilities: items whose start is drawn are drawn independently.</summary>
internal static class StartMarkings
{
    /// <exception cref="LimitExceededException">There are more than the limit.</exception>
    public static IReadOnlyList<(int[] Marking, double Probability)> Of(BoundModel model, GivenValues givens, long maxStates)
    {
        var values = givens.AsSpan().ToArray();
        var starts = new List<(int[] Marking, double Probability)> { (new int[model.Variables.Count], 1) };
        foreach (var item in model.Items)
        {
            var shares = item.Start.Select(s => GivenEvaluator.ValueOf(s, values)).ToArray();
            starts = item.StartIsDrawn ? Drawn(starts, item, shares, maxStates) : Placed(starts, item, shares);
        }

        foreach (var counter in model.Counters)
        {
            var start = (int)Math.Round(GivenEvaluator.ValueOf(counter.Start, values));
            starts.ForEach(s => s.Marking[counter.Variable] = start);
        }

        return starts;
    }

    private static List<(int[] Marking, double Probability)> Placed(List<(int[] Marking, double Probability)> starts, BoundItem item, double[] counts)
    {
        foreach (var (marking, _) in starts)
        {
            for (var s = 0; s < counts.Length; s++)
            {
                marking[item.FirstVariable + s] = (int)Math.Round(counts[s]);
            }
        }

        return starts;
    }

    private static List<(int[] Marking, double Probability)> Drawn(List<(int[] Marking, double Probability)> starts, BoundItem item, double[] chances, long maxStates)
    {
        if (starts.Count * chances.LongCount(c => c > 0) > maxStates)
        {
            throw new LimitExceededException("states", string.Create(
                CultureInfo.InvariantCulture,
                $"the model starts in more than the {maxStates:N0} states allowed, item {item.Name} drawn last; raise the limit (MaxStates, --max-states) or let fewer items start in a drawn state"));
        }

        var sum = chances.Sum();
        var drawn = new List<(int[] Marking, double Probability)>();
        foreach (var (marking, probability) in starts)
        {
            for (var s = 0; s < chances.Length; s++)
            {
                if (chances[s] > 0)
                {
                    var copy = (int[])marking.Clone();
                    copy[item.FirstVariable + s] = 1;
                    drawn.Add((copy, probability * (chances[s] / sum)));
                }
            }
        }

        return drawn;
    }
}
