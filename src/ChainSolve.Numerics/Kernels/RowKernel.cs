using ChainSolve.Numerics.Operators;

namespace ChainSolve.Numerics.Kernels;

/// <summary>The step on compressed rows of the transposed generator, one state after the other: for any pattern, and the twin of the vectorised one.</summary>
/// <param name="columns">The rates into each state.</param>
internal sealed class RowKernel(SparseRows columns) : IStepKernel
{
    /// <summary>What a transition takes on rows of any chain: it waits for memory.</summary>
    public static StepCost UsualCost { get; } = new(6, 14);

    public StepCost Cost => UsualCost;

    public StepTally Plain(StepVectors vectors, StepScale scale, int first, int last)
    {
        var (offsets, sources, rates) = (columns.Offsets, columns.Targets, columns.Values);
        var stays = scale.Stays;
        ReadOnlySpan<double> from = vectors.Read;
        var to = vectors.Written;
        Span<double> masses = stackalloc double[StepVectors.Lanes];
        masses.Clear();
        var dropped = 0;
        for (var j = first; j < last; j++)
        {
            var sum = from[j] * stays[j];
            var end = (int)offsets[stays[j] > 0 ? j + 1 : j];
            for (var e = (int)offsets[j]; e < end; e++)
            {
                sum = Math.FusedMultiplyAdd(rates[e], from[sources[e]], sum);
            }

            sum *= scale.Inverse;
            if (sum < StepScale.Flushed && sum > 0)
            {
                sum = 0;
                dropped++;
            }

            to[j] = sum;
            masses[j % StepVectors.Lanes] += sum;
        }

        return new StepTally(Sum(masses), dropped);
    }

    public StepTally Wide(StepVectors vectors, StepScale scale, int first, int last)
    {
        var (offsets, sources, rates) = (columns.Offsets, columns.Targets, columns.Values);
        ReadOnlySpan<double> from = vectors.Read;
        ReadOnlySpan<double> fromLow = vectors.FromLow.AsSpan(StepVectors.Lanes);
        var to = vectors.Written;
        var toLow = vectors.ToLow.AsSpan(StepVectors.Lanes);
        var (stays, staysLow, inverse) = (scale.Stays, scale.StaysLow, scale.Inverse);
        Span<double> masses = stackalloc double[StepVectors.Lanes];
        masses.Clear();
        var dropped = 0;
        for (var j = first; j < last; j++)
        {
            var sum = from[j] * stays[j];
            var rest = Math.FusedMultiplyAdd(from[j], stays[j], -sum);
            rest = Math.FusedMultiplyAdd(from[j], staysLow[j], rest);
            rest = Math.FusedMultiplyAdd(fromLow[j], stays[j], rest);
            var end = (int)offsets[stays[j] > 0 ? j + 1 : j];
            for (var e = (int)offsets[j]; e < end; e++)
            {
                var (rate, value) = (rates[e], from[sources[e]]);
                var product = rate * value;
                var small = Math.FusedMultiplyAdd(rate, value, -product);
                small = Math.FusedMultiplyAdd(rate, fromLow[sources[e]], small);
                var next = sum + product;
                var part = next - sum;
                rest += (sum - (next - part)) + (product - part) + small;
                sum = next;
            }

            // Two parts brought into form, times 1/q, and brought into form again.
            var high = sum + rest;
            var low = rest - (high - sum);
            var scaled = high * inverse;
            var scaledLow = Math.FusedMultiplyAdd(low, inverse, Math.FusedMultiplyAdd(high, inverse, -scaled));
            var result = scaled + scaledLow;
            var resultLow = scaledLow - (result - scaled);
            if (result < StepScale.Flushed && result > 0)
            {
                (result, resultLow) = (0, 0);
                dropped++;
            }

            (to[j], toLow[j]) = (result, resultLow);
            masses[j % StepVectors.Lanes] += result;
        }

        return new StepTally(Sum(masses), dropped);
    }

    /// <summary>The sum of eight lanes, in the order in which vectors are halved.</summary>
    internal static double Sum(ReadOnlySpan<double> lanes) =>
        ((lanes[0] + lanes[4]) + (lanes[2] + lanes[6])) + ((lanes[1] + lanes[5]) + (lanes[3] + lanes[7]));
}
