namespace ChainSolve.Numerics.Operators;

/// <summary>A generator cut down to some of its states.</summary>
/// <param name="Generator">The chain between the states that were kept; rates that lead out of them are dropped.</param>
/// <param name="States">The number in the whole chain of each state that was kept, ascending.</param>
internal sealed record Restriction(Generator Generator, int[] States)
{
    /// <summary>Keeps the states listed, ascending; the whole chain is taken as it is.</summary>
    public static Restriction Of(Generator whole, int[] states)
    {
        if (states.Length == whole.StateCount)
        {
            return new Restriction(whole, states);
        }

        var number = new int[whole.StateCount];
        Array.Fill(number, -1);
        for (var k = 0; k < states.Length; k++)
        {
            number[states[k]] = k;
        }

        var rows = whole.Rows;
        var offsets = new long[states.Length + 1];
        for (var k = 0; k < states.Length; k++)
        {
            offsets[k + 1] = offsets[k];
            for (var e = rows.Offsets[states[k]]; e < rows.Offsets[states[k] + 1]; e++)
            {
                offsets[k + 1] += number[rows.Targets[e]] >= 0 ? 1 : 0;
            }
        }

        var targets = new int[offsets[^1]];
        var values = new double[offsets[^1]];
        long at = 0;
        foreach (var state in states)
        {
            for (var e = rows.Offsets[state]; e < rows.Offsets[state + 1]; e++)
            {
                if (number[rows.Targets[e]] >= 0)
                {
                    targets[at] = number[rows.Targets[e]];
                    values[at++] = rows.Values[e];
                }
            }
        }

        return new Restriction(new Generator(new SparseRows(states.Length, offsets, targets, values)), states);
    }

    /// <summary>The entries of a vector over the whole chain at the states that were kept.</summary>
    public double[] Take(double[] whole) => [.. States.Select(s => whole[s])];

    /// <summary>A vector over the states that were kept, spread over the whole chain with zeros elsewhere.</summary>
    public double[] Spread(double[] part, int count)
    {
        var whole = new double[count];
        for (var k = 0; k < States.Length; k++)
        {
            whole[States[k]] = part[k];
        }

        return whole;
    }
}
