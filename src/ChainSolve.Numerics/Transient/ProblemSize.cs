using ChainSolve.Numerics.Operators;

namespace ChainSolve.Numerics.Transient;

/// <summary>The part of a chain that a problem can reach, in figures.</summary>
/// <param name="States">The number of states reached.</param>
/// <param name="Transitions">The number of transitions out of them.</param>
/// <param name="LargestExit">The largest exit rate of them.</param>
internal readonly record struct ProblemSize(long States, long Transitions, double LargestExit)
{
    /// <summary>
    /// The figures for choosing a method: exact up to <see cref="SquaringRun.MaxStates"/> states reached, those of the whole
    /// chain beyond, so that a choice does not cost a search through a large chain.
    /// </summary>
    public static ProblemSize Estimate(TransientProblem problem)
    {
        ProblemCheck.Check(problem);
        var (generator, alive) = (problem.Generator, problem.Alive);
        var found = new bool[generator.StateCount];
        var open = new Queue<int>();
        for (var i = 0; i < found.Length && open.Count <= SquaringRun.MaxStates; i++)
        {
            Find(i, problem.Start[i]);
        }

        var rows = generator.Rows;
        var size = default(ProblemSize);
        for (; open.TryDequeue(out var at); size = size.With(generator, at))
        {
            if (size.States + open.Count >= SquaringRun.MaxStates)
            {
                return new ProblemSize(generator.StateCount, generator.TransitionCount, generator.MaxExitRate);
            }

            for (var e = rows.Offsets[at]; e < rows.Offsets[at + 1]; e++)
            {
                Find(rows.Targets[e], rows.Values[e]);
            }
        }

        return size;

        void Find(int state, double weight)
        {
            if (weight > 0 && !found[state] && (alive is null || alive[state]))
            {
                found[state] = true;
                open.Enqueue(state);
            }
        }
    }

    /// <summary>The figures of states that were found to be reached.</summary>
    public static ProblemSize Of(Generator generator, bool[] reached)
    {
        var size = default(ProblemSize);
        for (var i = 0; i < reached.Length; i++)
        {
            size = reached[i] ? size.With(generator, i) : size;
        }

        return size;
    }

    private ProblemSize With(Generator generator, int state) => new(
        States + 1,
        Transitions + generator.Rows.Offsets[state + 1] - generator.Rows.Offsets[state],
        Math.Max(LargestExit, generator.ExitRates[state]));
}
