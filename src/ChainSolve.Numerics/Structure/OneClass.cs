using ChainSolve.Numerics.Operators;

namespace ChainSolve.Numerics.Structure;

/// <summary>Proves that a chain is one class by sweeps over its rows, which on chains numbered by what their states are costs far less than a search.</summary>
/// <remarks>
/// It is one class if the first state leads to all others and all others lead to it. A sweep goes through the states in their order or
/// backwards and carries either on; where neighbours in the chain are neighbours in number, a few sweeps reach everything.
/// </remarks>
internal static class OneClass
{
    // Where more are needed, a search in depth is the better way.
    private const int MostSweeps = 8;
    private const int StatesBetweenLooks = 1 << 16;

    /// <summary>Whether it is proved; where it is not, the chain may be one class all the same.</summary>
    public static bool IsProved(SparseRows rows, CancellationToken cancellation) =>
        rows.EntryCount >= rows.Count && ReachesAll(rows, Spread, cancellation) && ReachesAll(rows, Gather, cancellation);

    private delegate int Step(SparseRows rows, int state, bool[] marked);

    private static bool ReachesAll(SparseRows rows, Step step, CancellationToken cancellation)
    {
        var marked = new bool[rows.Count];
        marked[0] = true;
        var count = 1;
        for (var sweep = 0; sweep < MostSweeps && count < rows.Count; sweep++)
        {
            var before = count;
            for (var k = 0; k < rows.Count; k++)
            {
                if (k % StatesBetweenLooks == 0)
                {
                    cancellation.ThrowIfCancellationRequested();
                }

                count += step(rows, sweep % 2 == 0 ? k : rows.Count - 1 - k, marked);
            }

            if (count == before)
            {
                return false;
            }
        }

        return count == rows.Count;
    }

    // A state that is marked marks those it leads to.
    private static int Spread(SparseRows rows, int state, bool[] marked)
    {
        var count = 0;
        for (var e = rows.Offsets[state]; marked[state] && e < rows.Offsets[state + 1]; e++)
        {
            var target = rows.Targets[e];
            if (!marked[target] && rows.Values[e] > 0)
            {
                marked[target] = true;
                count++;
            }
        }

        return count;
    }

    // A state that leads to a marked one is marked.
    private static int Gather(SparseRows rows, int state, bool[] marked)
    {
        for (var e = rows.Offsets[state]; !marked[state] && e < rows.Offsets[state + 1]; e++)
        {
            if (marked[rows.Targets[e]] && rows.Values[e] > 0)
            {
                marked[state] = true;
                return 1;
            }
        }

        return 0;
    }
}
