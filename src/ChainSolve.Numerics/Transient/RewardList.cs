using ChainSolve.Numerics.Kernels;

namespace ChainSolve.Numerics.Transient;

/// <summary>A reward cut at the borders of chunks of states: as a list of the states where it is not zero, or in full where most have one. Immutable.</summary>
internal sealed class RewardList
{
    // A list takes this many times as long as all states, an element.
    private const int ListCost = 6;

    private readonly int chunkSize;
    private readonly int[] states;
    private readonly double[] values;
    private readonly int[] chunks;
    private readonly double[]? full;

    public RewardList(double[] reward, bool[] reached, int chunkSize)
    {
        this.chunkSize = chunkSize;
        states = [.. Enumerable.Range(0, reward.Length).Where(i => reached[i] && reward[i] > 0)];
        values = [.. states.Select(i => reward[i])];
        Largest = values.DefaultIfEmpty(0).Max();
        chunks = new int[((reward.Length - 1) / chunkSize) + 2];
        if ((long)states.Length * ListCost > reward.Length)
        {
            full = [.. reward.Select((r, i) => reached[i] ? r : 0)];
        }

        for (var (c, at) = (0, 0); c < chunks.Length; c++)
        {
            while (at < states.Length && states[at] < c * chunkSize)
            {
                at++;
            }

            chunks[c] = at;
        }
    }

    /// <summary>The largest entry; 0 where nothing can be earned.</summary>
    public double Largest { get; }

    /// <summary>The sum over one chunk, within <see cref="Arithmetic.LongSum.Rounding"/>.</summary>
    public double Sum(ReadOnlySpan<double> vector, int chunk)
    {
        if (full is not null)
        {
            var first = chunk * chunkSize;
            var length = Math.Min(chunkSize, vector.Length - first);
            return DotKernel.Full(full.AsSpan(first, length), vector.Slice(first, length));
        }

        var listed = chunks[chunk]..chunks[chunk + 1];
        return DotKernel.At(states.AsSpan(listed), values.AsSpan(listed), vector);
    }
}
