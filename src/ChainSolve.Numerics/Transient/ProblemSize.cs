namespace ChainSolve.Numerics.Transient;

/// <summary>The part of a chain that a problem can reach, in figures.</summary>
/// <param name="States">The number of states reached.</param>
/// <param name="Transitions">The number of transitions out of them.</param>
/// <param name="LargestExit">The largest exit rate of them.</param>
internal readonly record struct ProblemSize(long States, long Transitions, double LargestExit)
{
    public static ProblemSize Of(TransientProblem problem)
    {
        ProblemCheck.Check(problem);
        var generator = problem.Generator;
        var reached = ReachedChain.Reach(generator, problem.Start, problem.Alive);
        var (states, transitions, largest) = (0L, 0L, 0.0);
        for (var i = 0; i < reached.Length; i++)
        {
            if (reached[i])
            {
                states++;
                transitions += generator.Rows.Offsets[i + 1] - generator.Rows.Offsets[i];
                largest = Math.Max(largest, generator.ExitRates[i]);
            }
        }

        return new ProblemSize(states, transitions, largest);
    }
}
