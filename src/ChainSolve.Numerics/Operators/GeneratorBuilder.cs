namespace ChainSolve.Numerics.Operators;

/// <summary>Collects rates in any order and builds a <see cref="Generator"/>.</summary>
/// <remarks>Not safe to share between threads.</remarks>
public sealed class GeneratorBuilder
{
    private readonly int stateCount;
    private readonly List<(int From, int To, double Rate)> entries = [];

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
            entries.Add((from, to, rate));
        }

        return this;
    }

    /// <summary>Builds the generator from what was added so far.</summary>
    public Generator Build()
    {
        var sorted = entries.Select((entry, order) => (entry, order))
            .OrderBy(e => e.entry.From).ThenBy(e => e.entry.To).ThenBy(e => e.order).Select(e => e.entry);
        var offsets = new long[stateCount + 1];
        var targets = new List<int>();
        var values = new List<double>();
        var last = (From: -1, To: -1);
        foreach (var (from, to, rate) in sorted)
        {
            if ((from, to) == last)
            {
                values[^1] += rate;
                continue;
            }

            targets.Add(to);
            values.Add(rate);
            offsets[from + 1]++;
            last = (from, to);
        }

        for (var i = 0; i < stateCount; i++)
        {
            offsets[i + 1] += offsets[i];
        }

        return new Generator(new SparseRows(stateCount, offsets, [.. targets], [.. values]));
    }
}
