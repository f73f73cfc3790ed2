using ChainSolve.Numerics.Arithmetic;

namespace ChainSolve.Numerics.Timeline;

/// <summary>
/// What happens at an instant, such as a proof test or a change of mission phase: from every state the chain goes to
/// states, perhaps of another chain, with chances that add to 1.
/// </summary>
/// <remarks>Immutable; safe to share between threads. Holds 12 bytes a chance.</remarks>
public sealed class Jump
{
    private readonly long[] offsets;
    private readonly int[] targets;
    private readonly double[] chances;

    private Jump(int targetCount, long[] offsets, int[] targets, double[] chances)
    {
        (TargetCount, this.offsets, this.targets, this.chances) = (targetCount, offsets, targets, chances);
    }

    /// <summary>The number of states before the jump.</summary>
    public int SourceCount => offsets.Length - 1;

    /// <summary>The number of states after the jump.</summary>
    public int TargetCount { get; }

    /// <summary>A jump that leads from each state to one other.</summary>
    /// <param name="targetOf">By state before the jump: the state after it.</param>
    /// <param name="targetCount">The number of states after the jump.</param>
    /// <exception cref="ArgumentException">A target is no state.</exception>
    public static Jump Map(int[] targetOf, int targetCount)
    {
        ArgumentNullException.ThrowIfNull(targetOf);
        return Of(targetOf.Length, targetCount, targetOf.Select((to, from) => (from, to, 1.0)));
    }

    /// <summary>A jump of any kind.</summary>
    /// <param name="sourceCount">The number of states before the jump; at least 1.</param>
    /// <param name="targetCount">The number of states after the jump; at least 1.</param>
    /// <param name="entries">State before, state after, and its chance, in any order; chances of one pair add up.</param>
    /// <exception cref="ArgumentException">A state or chance is out of range, or the chances of a state do not add to 1 within 1e-9.</exception>
    public static Jump Of(int sourceCount, int targetCount, IEnumerable<(int From, int To, double Chance)> entries)
    {
        ArgumentOutOfRangeException.ThrowIfLessThan(sourceCount, 1);
        ArgumentOutOfRangeException.ThrowIfLessThan(targetCount, 1);
        ArgumentNullException.ThrowIfNull(entries);
        var given = entries.ToArray();
        foreach (var (from, to, chance) in given)
        {
            if (from < 0 || from >= sourceCount || to < 0 || to >= targetCount)
            {
                throw new ArgumentException(
                    $"A jump leads from {from} to {to}; the states are 0 to {sourceCount - 1} before it and 0 to {targetCount - 1} after it.",
                    nameof(entries));
            }

            if (!(chance >= 0) || chance > 1 + 1e-9)
            {
                throw new ArgumentException($"The chance from {from} to {to} is {chance}; it must be from 0 to 1.", nameof(entries));
            }
        }

        var merged = given.Where(e => e.Chance > 0)
            .GroupBy(e => (e.From, e.To))
            .OrderBy(g => g.Key)
            .Select(g => (g.Key.From, g.Key.To, Chance: g.Sum(e => e.Chance)))
            .ToArray();
        var offsets = new long[sourceCount + 1];
        var sums = new LongSum[sourceCount];
        foreach (var (from, _, chance) in merged)
        {
            offsets[from + 1]++;
            sums[from].Add(chance);
        }

        for (var i = 0; i < sourceCount; i++)
        {
            offsets[i + 1] += offsets[i];
            if (Math.Abs(sums[i].Value - 1) > 1e-9)
            {
                throw new ArgumentException($"The chances from state {i} add to {sums[i].Value}, not to 1.", nameof(entries));
            }
        }

        return new Jump(targetCount, offsets, [.. merged.Select(e => e.To)], [.. merged.Select(e => e.Chance)]);
    }

    /// <summary>The chance of going from a state before the jump to a state after it.</summary>
    public double Chance(int from, int to)
    {
        ArgumentOutOfRangeException.ThrowIfNegative(from);
        ArgumentOutOfRangeException.ThrowIfGreaterThanOrEqual(from, SourceCount);
        var start = (int)offsets[from];
        var at = Array.BinarySearch(targets, start, (int)offsets[from + 1] - start, to);
        return at >= 0 ? chances[at] : 0;
    }

    /// <summary>The distribution after the jump from the one before it.</summary>
    /// <param name="before">One probability for each state before the jump; non-negative numbers of any sum are legal.</param>
    /// <returns>A new array, one entry for each state after the jump. Each is right to about one rounding.</returns>
    public double[] Forward(double[] before)
    {
        Check(before, SourceCount, nameof(before));
        var sums = new LongSum[TargetCount];
        for (var i = 0; i < SourceCount; i++)
        {
            for (var e = offsets[i]; e < offsets[i + 1]; e++)
            {
                sums[targets[e]].AddProduct(before[i], chances[e]);
            }
        }

        return Array.ConvertAll(sums, s => s.Value);
    }

    /// <summary>The expected value before the jump of numbers that hold after it.</summary>
    /// <param name="after">One number for each state after the jump.</param>
    /// <returns>A new array, one entry for each state before the jump.</returns>
    public double[] Backward(double[] after)
    {
        Check(after, TargetCount, nameof(after));
        var result = new double[SourceCount];
        for (var i = 0; i < SourceCount; i++)
        {
            LongSum sum = default;
            for (var e = offsets[i]; e < offsets[i + 1]; e++)
            {
                sum.AddProduct(chances[e], after[targets[e]]);
            }

            result[i] = sum.Value;
        }

        return result;
    }

    private static void Check(double[] values, int count, string name)
    {
        ArgumentNullException.ThrowIfNull(values, name);
        if (values.Length != count)
        {
            throw new ArgumentException($"There are {values.Length} entries for {count} states.", name);
        }
    }
}
