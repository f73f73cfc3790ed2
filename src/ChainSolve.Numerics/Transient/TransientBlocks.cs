using ChainSolve.Numerics.Arithmetic;
using ChainSolve.Numerics.Kernels;
using ChainSolve.Numerics.Operators;
using ChainSolve.Numerics.Structure;

namespace ChainSolve.Numerics.Transient;

/// <summary>
/// The states that a chain leaves for good, in blocks of states that reach each other; a block stands before those that it feeds. Which blocks are
/// still looked at is up to the caller. Immutable.
/// </summary>
internal sealed class TransientBlocks
{
    private readonly SparseRows rows;
    private readonly int[] states;
    private readonly int[] starts;
    private readonly int[] blockOf;

    /// <summary>Finds the blocks.</summary>
    /// <param name="generator">The chain.</param>
    /// <param name="reached">The states that count.</param>
    /// <param name="cancellation">Stops the search.</param>
    public TransientBlocks(Generator generator, bool[] reached, CancellationToken cancellation)
    {
        rows = generator.Rows;
        IsClosed = Array.ConvertAll(ChainClasses.Of(generator, reached, cancellation).ClassOf, c => c >= 0);
        var isTransient = new bool[reached.Length];
        for (var i = 0; i < reached.Length; i++)
        {
            isTransient[i] = reached[i] && !IsClosed[i];
        }

        var components = StrongComponents.Find(generator, isTransient, cancellation);
        starts = new int[components.Count + 1];

        // A rate never leads to a component of a higher number: turned round, what feeds comes first.
        blockOf = [.. components.ComponentOf.Select(c => c < 0 ? -1 : components.Count - 1 - c)];
        foreach (var block in blockOf.Where(b => b >= 0))
        {
            starts[block + 1]++;
        }

        for (var b = 0; b < Count; b++)
        {
            starts[b + 1] += starts[b];
        }

        states = new int[starts[^1]];
        var filled = starts.ToArray();
        for (var i = 0; i < blockOf.Length; i++)
        {
            if (blockOf[i] >= 0)
            {
                states[filled[blockOf[i]]++] = i;
            }
        }
    }

    public int Count => starts.Length - 1;

    /// <summary>By state: whether it belongs to a class that is never left.</summary>
    public bool[] IsClosed { get; }

    /// <summary>The states of some blocks that stand one after the other.</summary>
    public ReadOnlySpan<int> States(Range blocks) => states.AsSpan(starts[blocks.Start]..starts[blocks.End]);

    /// <summary>What a block holds.</summary>
    public double Mass(ReadOnlySpan<double> vector, int block)
    {
        var sum = 0.0;
        foreach (var i in States(block..(block + 1)))
        {
            sum += vector[i];
        }

        return sum;
    }

    /// <summary>Which share of its mass a state will keep for some steps, if its block goes on as in the last step; all outside of the blocks.</summary>
    public double[] Survival(StepVectors vectors, bool[] isCleared, double steps)
    {
        var survival = new double[vectors.Count];
        Array.Fill(survival, 1);
        for (var b = 0; b < Count; b++)
        {
            var before = isCleared[b] ? 0 : Mass(vectors.Written, b);
            var kept = before > 0 ? Math.Min(1, Mass(vectors.Read, b) / before) : 1;
            foreach (var i in States(b..(b + 1)))
            {
                survival[i] = Math.Exp(steps * Math.Log(kept));
            }
        }

        return survival;
    }

    /// <summary>Marks the blocks that a block feeds.</summary>
    public void MarkFed(int block, bool[] isFed)
    {
        // Nothing comes after the last one.
        foreach (var i in block < Count - 1 ? States(block..(block + 1)) : [])
        {
            for (var e = rows.Offsets[i]; e < rows.Offsets[i + 1]; e++)
            {
                var next = blockOf[rows.Targets[e]];
                if (next > block && rows.Values[e] > 0)
                {
                    isFed[next] = true;
                }
            }
        }
    }

    /// <summary>What some blocks feed into all other states that count in a step: high and low parts; null where it is nothing.</summary>
    /// <param name="vectors">The vector.</param>
    /// <param name="blocks">The blocks.</param>
    /// <param name="inverse">1/q.</param>
    public (double[] High, double[] Low)? FedBy(StepVectors vectors, Range blocks, double inverse)
    {
        var (first, last) = (blocks.Start.Value, blocks.End.Value);
        var (high, low) = (new double[vectors.Count], new double[vectors.Count]);
        var isAny = false;
        foreach (var i in States(blocks))
        {
            var mass = DoubleDouble.Of(vectors.Read[i], vectors.FromLow[i + StepVectors.Lanes]) * inverse;
            for (var e = rows.Offsets[i]; e < rows.Offsets[i + 1]; e++)
            {
                var to = rows.Targets[e];
                if (IsClosed[to] || (blockOf[to] >= last))
                {
                    var sum = DoubleDouble.Of(high[to], low[to]) + (mass * rows.Values[e]);
                    (high[to], low[to]) = (sum.High, sum.Low);
                    isAny |= sum.High > 0;
                }
            }
        }

        return isAny ? (high, low) : null;
    }

    /// <summary>Sets the states of some blocks to zero.</summary>
    public void Clear(StepVectors vectors, Range blocks)
    {
        foreach (var i in States(blocks))
        {
            vectors.Read[i] = 0;
            vectors.FromLow[i + StepVectors.Lanes] = 0;
        }
    }
}
