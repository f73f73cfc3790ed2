namespace ChainSolve.Reports;

/// <summary>What exploring found, as text.</summary>
internal static class ExplorationText
{
    public static void Write(Exploration found, TextWriter writer)
    {
        writer.Write($"{SolutionText.Sizes(found.StateCount, found.TransitionCount)}, {NumberText.Seconds(found.Elapsed)}\n");
        writer.Write($"{Classes(found)}\n");
        var unit = found.Model.TimeUnit.Length == 0 ? "" : $" per {found.Model.TimeUnit}";
        writer.Write($"the fastest state is left at {NumberText.Written(found.LargestExitRate)}{unit}\n");
        writer.Write($"{Of(found.Model.Givens.Count, "given")}, {Of(found.Model.Measures.Count, "measure")}\n");
    }

    private static string Classes(Exploration found)
    {
        if (found.RecurrentClassCount == 1 && found.TransientStateCount == 0)
        {
            return "every state can be reached from every other";
        }

        var groups = found.RecurrentClassCount - found.AbsorbingStateCount;
        var parts = new List<string>();
        if (found.TransientStateCount > 0)
        {
            parts.Add($"{Of(found.TransientStateCount, "state")} left for good sooner or later");
        }

        if (found.AbsorbingStateCount > 0)
        {
            parts.Add($"{Of(found.AbsorbingStateCount, "state")} never left");
        }

        if (groups > 0)
        {
            parts.Add($"{Of(groups, "group")} of states never left");
        }

        return string.Join(", ", parts);
    }

    private static string Of(long count, string word) => $"{NumberText.Count(count)} {word}{(count == 1 ? "" : "s")}";
}
