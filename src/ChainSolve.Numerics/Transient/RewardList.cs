using ChainSolve.Numerics.Arithmetic;

namespace ChainSolve.Numerics.Transient;

/// <summary>The states where a reward is not zero, cut at the borders of chunks of states. Immutable.</summary>
internal sealed class RewardList
{
    private readonly int[] states;
    private readonly double[] values;
    private readonly int[] chunks;

    public RewardList(double[] reward, bool[] reached, int chunkSize)
    {
        states = [.. Enumerable.Range(0, reward.Length).Where(i => reached[i] && reward[i] > 0)];
        values = [.. states.Select(i => reward[i])];
        Largest = values.DefaultIfEmpty(0).Max();
        chunks = new int[((reward.Length - 1) / chunkSize) + 2];
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

    /// <summary>The sum over one chunk, within <see cref="LongSum.Rounding"/>.</summary>
    public double Sum(double[] vector, int chunk)
    {
        LongSum sum = default;
        for (var k = chunks[chunk]; k < chunks[chunk + 1]; k++)
        {
            sum.AddProduct(values[k], vector[states[k]]);
        }

        return sum.Value;
    }
}
