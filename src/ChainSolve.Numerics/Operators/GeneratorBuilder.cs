using System.Runtime.InteropServices;

namespace ChainSolve.Numerics.Operators;

/// <summary>Collects rates in any order and builds a <see cref="Generator"/>.</summary>
/// <remarks>Not safe to share between threads. Holds 16 bytes a transition.</remarks>
public sealed class GeneratorBuilder
{
    private readonly int stateCount;
    private readonly List<Entry> entries = [];

    /// <summary>Starts a generator.</summary>
    /// <param name="stateCount">The number of states; at least 1.</param>
    /// <exception cref="ArgumentOutOfRangeException"><paramref name="stateCount"/> is less than 1.</exception>
    public GeneratorBuilder(int stateCount)
    {
        ArgumentOutOfRangeException.ThrowIfLessThan(stateCount, 1);
        this.stateCount = stateCount;
    }

    /// <summary>Adds a transition; rates between the same two states add up, a transition to the same state is dropped.</summary>
    /// <param name="from">The state that is left, from 0.</param>
    /// <param name="to">The state that is entered, from 0.</param>
    /// <param name="rate">The rate per unit of time; finite and not negative.</param>
    /// <returns>This builder.</returns>
    /// <exception cref="ArgumentOutOfRangeException">A state or the rate is out of range.</exception>
    public GeneratorBuilder Add(int from, int to, double rate)
    {
        ArgumentOutOfRangeException.ThrowIfNegative(from);
        ArgumentOutOfRangeException.ThrowIfGreaterThanOrEqual(from, stateCount);
        ArgumentOutOfRangeException.ThrowIfNegative(to);
        ArgumentOutOfRangeException.ThrowIfGreaterThanOrEqual(to, stateCount);
        if (!double.IsFinite(rate) || rate < 0)
        {
            throw new ArgumentOutOfRangeException(nameof(rate), rate, "A rate must be finite and not negative.");
        }

        if (from != to && rate > 0)
        {
            entries.Add(new Entry(from, to, rate));
        }

        return this;
    }

    /// <summary>Builds the generator from what was added so far. Costs two counting sorts.</summary>
    /// <exception cref="ArgumentException">The rates out of a state add up to more than a double holds.</exception>
    public Generator Build()
    {
        var byTarget = new Entry[entries.Count];
        Scatter(CollectionsMarshal.AsSpan(entries), byTarget, static e => e.To);
        var sorted = new Entry[byTarget.Length];
        Scatter(byTarget, sorted, static e => e.From);

        // Both sorts keep the order of equals, so rates of one pair add up in the order in which they came.
        var offsets = new long[stateCount + 1];
        var kept = 0;
        for (var k = 0; k < sorted.Length; k++)
        {
            if (kept > 0 && sorted[kept - 1].From == sorted[k].From && sorted[kept - 1].To == sorted[k].To)
            {
                sorted[kept - 1] = sorted[kept - 1] with { Rate = sorted[kept - 1].Rate + sorted[k].Rate };
                continue;
            }

            sorted[kept++] = sorted[k];
            offsets[sorted[k].From + 1]++;
        }

        for (var i = 0; i < stateCount; i++)
        {
            offsets[i + 1] += offsets[i];
        }

        var targets = new int[kept];
        var rates = new double[kept];
        for (var k = 0; k < kept; k++)
        {
            (targets[k], rates[k]) = (sorted[k].To, sorted[k].Rate);
        }

        return new Generator(new SparseRows(stateCount, offsets, targets, rates));
    }

    private void Scatter(ReadOnlySpan<Entry> source, Entry[] target, Func<Entry, int> key)
    {
        var next = new int[stateCount + 1];
        foreach (var entry in source)
        {
            next[key(entry) + 1]++;
        }

        for (var i = 0; i < stateCount; i++)
        {
            next[i + 1] += next[i];
        }

        foreach (var entry in source)
        {
            target[next[key(entry)]++] = entry;
        }
    }

    private readonly record struct Entry(int From, int To, double Rate);
}
