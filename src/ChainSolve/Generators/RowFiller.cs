using ChainSolve.Modelling;
using ChainSolve.Numerics.Iteration;
using ChainSolve.StateSpace;

namespace ChainSolve.Generators;

/// <summary>
/// Fills the rows of a generator. Threads take chunks of states in turn, each into buffers of its own; in the order of the chunks they learn
/// where their entries belong, and bring them there. So the rows are the same for any number of threads, and stand in memory once.
/// </summary>
internal sealed class RowFiller
{
    private const int StatesOfAChunk = 1024;

    // Fewer chunks than this are sooner filled than threads told of them.
    private const int FewChunks = 4;

    private readonly StateTable states;
    private readonly SolveContext context;
    private readonly GeneratorRows? known;
    private readonly StateRows[] readers;
    private readonly long[] offsets;
    private readonly int[] targets;
    private readonly double[] rates;
    private int taken;
    private int turn;
    private long filled;
    private volatile bool isStopped;

    /// <param name="states">The states.</param>
    /// <param name="givens">The values of the givens.</param>
    /// <param name="known">Rows of the same states whose places the new ones have to share; null to find the places.</param>
    /// <param name="context">Threads, cancellation and progress.</param>
    public RowFiller(StateTable states, GivenValues givens, GeneratorRows? known, SolveContext context)
    {
        (this.states, this.known, this.context) = (states, known, context);
        var threads = Chunks < FewChunks ? 1 : context.Threads;
        readers = [.. Enumerable.Range(0, threads).Select(_ => states.Rows(givens, context.Cancellation))];
        offsets = known?.Offsets ?? new long[states.Count + 1];
        targets = known?.Targets ?? GC.AllocateUninitializedArray<int>((int)states.TransitionCount);
        rates = GC.AllocateUninitializedArray<double>((int)states.TransitionCount);
    }

    private int Chunks => (int)((states.Count + (long)StatesOfAChunk - 1) / StatesOfAChunk);

    /// <summary>Fills them; null where they are not among the places of those that are known.</summary>
    /// <exception cref="StateFaultException">Something that is enabled in a state is not possible.</exception>
    public GeneratorRows? Fill()
    {
        Workers.ForEach(readers, readers.Length, Fill);
        if (isStopped)
        {
            return null;
        }

        var happens = new bool[readers[0].Happens().Length];
        foreach (var reader in readers)
        {
            var seen = reader.Happens();
            for (var t = 0; t < happens.Length; t++)
            {
                happens[t] |= seen[t];
            }
        }

        return new GeneratorRows(offsets, targets, rates, happens);
    }

    private void Fill(StateRows reader)
    {
        var isDone = false;
        try
        {
            for (var chunk = NextChunk(); chunk < Chunks && !isStopped; chunk = NextChunk())
            {
                context.Cancellation.ThrowIfCancellationRequested();
                var first = chunk * StatesOfAChunk;
                if (reader == readers[0])
                {
                    context.Progress?.Report(new SolveProgress("filling the generator", first, states.Count, ""));
                }

                if (!reader.TryRead(first, Math.Min(StatesOfAChunk, states.Count - first)) || !Place(reader, chunk, first))
                {
                    return;
                }
            }

            isDone = true;
        }
        finally
        {
            // Nobody waits for one who does not come.
            isStopped |= !isDone;
        }
    }

    private int NextChunk() => Interlocked.Increment(ref taken) - 1;

    private bool Place(StateRows reader, int chunk, int first)
    {
        for (var wait = default(SpinWait); Volatile.Read(ref turn) != chunk;)
        {
            if (isStopped)
            {
                return false;
            }

            wait.SpinOnce(sleep1Threshold: -1);
        }

        // Other values of the givens may allow more than what was met while exploring.
        var start = filled;
        var fits = start + reader.Targets.Length <= rates.Length;
        filled += reader.Targets.Length;
        Volatile.Write(ref turn, chunk + 1);
        if (!fits || (known is not null && !IsKnown(reader, first, start)))
        {
            return false;
        }

        if (known is null)
        {
            var at = start;
            for (var i = 0; i < reader.Counts.Length; i++)
            {
                offsets[first + i + 1] = at += reader.Counts[i];
            }

            reader.Targets.CopyTo(targets.AsSpan((int)start));
        }

        reader.Rates.CopyTo(rates.AsSpan((int)start));
        return true;
    }

    private bool IsKnown(StateRows reader, int first, long start)
    {
        var at = start;
        for (var i = 0; i < reader.Counts.Length; i++)
        {
            at += reader.Counts[i];
            if (offsets[first + i + 1] != at)
            {
                return false;
            }
        }

        return reader.Targets.SequenceEqual(targets.AsSpan((int)start, reader.Targets.Length));
    }
}
