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
        var room = (int)Math.Min(states.MostTransitions, Array.MaxLength);
        var targets = GC.AllocateUninitializedArray<int>(room);
        var rates = GC.AllocateUninitializedArray<double>(room);
        var row = new RowBuffer(transitions);
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
            if (!row.Read(states, finder.Successors, state))
            {
                return null;
            }

            // Other values of the givens may allow more than what was met while exploring.
            if (count + row.Count > room)
            {
                return null;
            }

            count += row.CopyTo(targets.AsSpan(count), rates.AsSpan(count));
            offsets[state + 1] = count;
        }

        Array.Resize(ref targets, count);
        Array.Resize(ref rates, count);
        return new GeneratorRows(offsets, targets, rates, row.Happens);
    }

    /// <summary>Whether entries stand at the same places.</summary>
    public bool HasPatternOf(GeneratorRows other) =>
        Offsets.AsSpan().SequenceEqual(other.Offsets) && Targets.AsSpan().SequenceEqual(other.Targets);
}
