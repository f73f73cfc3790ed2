using ChainSolve.Numerics.Operators;

namespace ChainSolve.Numerics.Structure;

/// <summary>The classes of a chain: sets of states that are never left once entered, and the states outside of them.</summary>
/// <remarks>Immutable by contract; safe to share between threads. Rates that are stored as zero count as absent.</remarks>
public sealed class ChainClasses
{
    private const int StatesBetweenLooks = 1 << 16;

    private ChainClasses(int[][] recurrent, int[] transient, int[] classOf)
    {
        Recurrent = recurrent;
        Transient = transient;
        ClassOf = classOf;
    }

    /// <summary>The recurrent classes, each with its states ascending, in the order of their first states.</summary>
    public IReadOnlyList<int[]> Recurrent { get; }

    /// <summary>The states that are left for good with probability one, ascending.</summary>
    public int[] Transient { get; }

    /// <summary>The states without any transition out, ascending: recurrent classes of one state.</summary>
    public IEnumerable<int> Absorbing => Recurrent.Where(c => c.Length == 1).Select(c => c[0]);

    /// <summary>By state: the position of its class in <see cref="Recurrent"/>, -1 for transient states, -2 for states that were masked out.</summary>
    public int[] ClassOf { get; }

    /// <summary>Whether every state can be reached from every other.</summary>
    public bool IsIrreducible => Recurrent.Count == 1 && Transient.Length == 0;

    /// <summary>Finds the classes. Costs one pass over the transitions and 28 bytes a state while it runs; those of all states are kept with the chain.</summary>
    /// <param name="generator">The chain.</param>
    /// <param name="alive">
    /// The states that are looked at; null for all. A rate to a state outside counts as a way out, so that a class is
    /// recurrent only if it can never be left at all.
    /// </param>
    /// <param name="cancellation">Stops the search.</param>
    /// <exception cref="ArgumentException">The mask has another length than the chain.</exception>
    public static ChainClasses Of(Generator generator, bool[]? alive = null, CancellationToken cancellation = default)
    {
        ArgumentNullException.ThrowIfNull(generator);
        if (alive is not null && alive.Length != generator.StateCount)
        {
            throw new ArgumentException($"The mask has {alive.Length} entries, the chain {generator.StateCount} states.", nameof(alive));
        }

        return alive is null
            ? generator.Classes ??= OneClass.IsProved(generator.Rows, cancellation) ? All(generator.StateCount) : Find(generator, null, cancellation)
            : Find(generator, alive, cancellation);
    }

    private static ChainClasses All(int count) => new([[.. Enumerable.Range(0, count)]], [], new int[count]);

    private static ChainClasses Find(Generator generator, bool[]? alive, CancellationToken cancellation)
    {
        var components = StrongComponents.Find(generator, alive, cancellation);
        var component = components.ComponentOf;
        var isLeft = new bool[components.Count];
        var rows = generator.Rows;
        for (var i = 0; i < rows.Count; i++)
        {
            if (i % StatesBetweenLooks == 0)
            {
                cancellation.ThrowIfCancellationRequested();
            }

            for (var e = rows.Offsets[i]; component[i] >= 0 && e < rows.Offsets[i + 1]; e++)
            {
                isLeft[component[i]] |= rows.Values[e] > 0 && component[rows.Targets[e]] != component[i];
            }
        }

        var sizes = new int[components.Count];
        foreach (var c in component.Where(c => c >= 0))
        {
            sizes[c]++;
        }

        var position = new int[components.Count];
        Array.Fill(position, -1);
        var recurrent = new List<int[]>();
        var filled = new List<int>();
        var transient = new List<int>();
        var classOf = component;
        for (var i = 0; i < rows.Count; i++)
        {
            var c = component[i];
            if (c < 0)
            {
                classOf[i] = -2;
                continue;
            }

            if (isLeft[c])
            {
                transient.Add(i);
                classOf[i] = -1;
                continue;
            }

            if (position[c] < 0)
            {
                position[c] = recurrent.Count;
                recurrent.Add(new int[sizes[c]]);
                filled.Add(0);
            }

            recurrent[position[c]][filled[position[c]]++] = i;
            classOf[i] = position[c];
        }

        return new ChainClasses([.. recurrent], [.. transient], classOf);
    }
}
