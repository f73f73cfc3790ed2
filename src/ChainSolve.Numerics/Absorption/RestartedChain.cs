using ChainSolve.Numerics.Operators;

namespace ChainSolve.Numerics.Absorption;

/// <summary>
/// A chain that is left for good, made recurrent: where it ends, it starts again. The stationary probabilities of the
/// states are then proportional to their sojourn times, and iterations converge as the chain mixes, however rarely it ends.
/// </summary>
internal static class RestartedChain
{
    /// <summary>Adds one state for the end, behind the others, with the rate <paramref name="restart"/> back to the start.</summary>
    /// <param name="rows">The rates between the states.</param>
    /// <param name="toEnd">The rate of each state to the end.</param>
    /// <param name="start">A share for each state, adding to about 1.</param>
    /// <param name="restart">The rate out of the end.</param>
    public static Generator Of(SparseRows rows, double[] toEnd, double[] start, double restart)
    {
        var n = rows.Count;
        var offsets = new long[n + 2];
        for (var i = 0; i < n; i++)
        {
            offsets[i + 1] = offsets[i] + rows.Offsets[i + 1] - rows.Offsets[i] + (toEnd[i] > 0 ? 1 : 0);
        }

        offsets[n + 1] = offsets[n] + start.Count(p => p > 0);
        var targets = new int[offsets[^1]];
        var rates = new double[offsets[^1]];
        for (var i = 0; i < n; i++)
        {
            var length = rows.Offsets[i + 1] - rows.Offsets[i];
            Array.Copy(rows.Targets, rows.Offsets[i], targets, offsets[i], length);
            Array.Copy(rows.Values, rows.Offsets[i], rates, offsets[i], length);
            if (toEnd[i] > 0)
            {
                (targets[offsets[i] + length], rates[offsets[i] + length]) = (n, toEnd[i]);
            }
        }

        var at = offsets[n];
        for (var j = 0; j < n; j++)
        {
            if (start[j] > 0)
            {
                (targets[at], rates[at]) = (j, start[j] * restart);
                at++;
            }
        }

        return new Generator(new SparseRows(n + 1, offsets, targets, rates));
    }
}
