using ChainSolve.Numerics.Operators;

namespace ChainSolve.Numerics.Structure;

/// <summary>Which states can be reached along positive rates.</summary>
/// <remarks>Safe to call from several threads. Costs one pass over the transitions of the states that are found.</remarks>
public static class Reachability
{
    /// <summary>The states that can be reached from a set, the set itself included.</summary>
    /// <param name="generator">The chain.</param>
    /// <param name="from">True for the states of the set; one entry a state.</param>
    /// <param name="alive">The states that may be visited; null for all. Members of the set outside of it are dropped.</param>
    /// <returns>One entry a state, a new array.</returns>
    public static bool[] From(Generator generator, bool[] from, bool[]? alive = null)
    {
        ArgumentNullException.ThrowIfNull(generator);
        return Search(generator.Rows, from, alive);
    }

    /// <summary>The states from which a set can be reached, the set itself included.</summary>
    /// <param name="generator">The chain.</param>
    /// <param name="to">True for the states of the set; one entry a state.</param>
    /// <param name="alive">The states that may be visited; null for all. Members of the set outside of it are dropped.</param>
    /// <returns>One entry a state, a new array.</returns>
    public static bool[] To(Generator generator, bool[] to, bool[]? alive = null)
    {
        ArgumentNullException.ThrowIfNull(generator);
        return Search(generator.Columns, to, alive);
    }

    private static bool[] Search(SparseRows edges, bool[] set, bool[]? alive)
    {
        ArgumentNullException.ThrowIfNull(set);
        if (set.Length != edges.Count || (alive is not null && alive.Length != edges.Count))
        {
            throw new ArgumentException($"The set has {set.Length} entries and the mask {alive?.Length ?? edges.Count}; the chain has {edges.Count} states.");
        }

        var found = new bool[edges.Count];
        var open = new Stack<int>();
        for (var i = 0; i < found.Length; i++)
        {
            if (set[i] && (alive is null || alive[i]))
            {
                found[i] = true;
                open.Push(i);
            }
        }

        while (open.TryPop(out var at))
        {
            for (var e = edges.Offsets[at]; e < edges.Offsets[at + 1]; e++)
            {
                var next = edges.Targets[e];
                if (edges.Values[e] > 0 && !found[next] && (alive is null || alive[next]))
                {
                    found[next] = true;
                    open.Push(next);
                }
            }
        }

        return found;
    }
}
