using ChainSolve.Numerics.Iteration;
using ChainSolve.StateSpace;

namespace ChainSolve.Generators;

/// <summary>The rows of a generator, with what was learnt while they were filled.</summary>
/// <param name="Offsets">Entries of row i stand at <c>[Offsets[i], Offsets[i + 1])</c>.</param>
/// <param name="Targets">The target of each entry, ascending within a row.</param>
/// <param name="Rates">The rate of each entry.</param>
/// <param name="Happens">Which transitions are possible in some state.</param>
internal sealed record GeneratorRows(long[] Offsets, int[] Targets, double[] Rates, bool[] Happens)
{
    private const int StatesBetweenLooks = 4096;

    /// <summary>
    /// Fills the rows state by state; rates between the same states add up in the order of the transitions. Null where a state leads to one that
    /// is not in the table, so that the table belongs to other values of the givens.
    /// </summary>
    public static GeneratorRows? Fill(StateTable states, SuccessorFinder finder, int variables, int transitions, SolveContext context)
    {
        var offsets = new long[states.Count + 1];
        var targets = new int[Math.Max(16, states.Count)];
        var rates = new double[targets.Length];
        var happens = new bool[transitions];
        var row = new List<(int Target, double Rate)>();
        var marking = new int[variables];
        var count = 0;
        for (var state = 0; state < states.Count; state++)
        {
            if (state % StatesBetweenLooks == 0)
            {
                context.Cancellation.ThrowIfCancellationRequested();
                context.Progress?.Report(new SolveProgress("filling the generator", state, states.Count, ""));
            }

            states.ReadMarking(state, marking);
            finder.Find(marking);
            if (!Read(states, finder.Successors, state, row, happens))
            {
                return null;
            }

            if (count + row.Count > targets.Length)
            {
                var length = (int)Math.Min(Math.Max(2L * targets.Length, count + (long)row.Count), Array.MaxLength);
                Array.Resize(ref targets, length);
                Array.Resize(ref rates, length);
            }

            var rowStart = count;
            foreach (var (target, rate) in row)
            {
                if (count > rowStart && targets[count - 1] == target)
                {
                    rates[count - 1] += rate;
                }
                else
                {
                    targets[count] = target;
                    rates[count++] = rate;
                }
            }

            offsets[state + 1] = count;
        }

        Array.Resize(ref targets, count);
        Array.Resize(ref rates, count);
        return new GeneratorRows(offsets, targets, rates, happens);
    }

    /// <summary>Whether entries stand at the same places.</summary>
    public bool HasPatternOf(GeneratorRows other) =>
        Offsets.AsSpan().SequenceEqual(other.Offsets) && Targets.AsSpan().SequenceEqual(other.Targets);

    private static bool Read(StateTable states, SuccessorList successors, int state, List<(int Target, double Rate)> row, bool[] happens)
    {
        row.Clear();
        for (var s = 0; s < successors.Count; s++)
        {
            happens[successors.Transition(s)] = true;
            var target = states.Find(successors.Marking(s));
            if (target < 0)
            {
                return false;
            }

            // A rate may underflow to 0 when it is shared out among drawn targets; the target stays reachable.
            if (target != state)
            {
                row.Add((target, successors.Rate(s)));
            }
        }

        // Stable, so that rates to one target are added in the order of the transitions.
        for (var i = 1; i < row.Count; i++)
        {
            var entry = row[i];
            var at = i;
            for (; at > 0 && row[at - 1].Target > entry.Target; at--)
            {
                row[at] = row[at - 1];
            }

            row[at] = entry;
        }

        return true;
    }
}
