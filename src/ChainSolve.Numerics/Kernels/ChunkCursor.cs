using System.Runtime.CompilerServices;
using ChainSolve.Numerics.Operators;

namespace ChainSolve.Numerics.Kernels;

/// <summary>Merges the sources of eight neighbouring states by their offsets. For one thread.</summary>
internal sealed class ChunkCursor(SparseRows columns, bool[] among)
{
    private const int Lanes = StepVectors.Lanes;
    private const int None = int.MaxValue;

    private readonly long[] at = new long[Lanes];
    private readonly long[] end = new long[Lanes];
    private readonly int[] offsets = new int[Lanes];
    private int first;

    /// <summary>How many transitions were taken since the start of the chunk.</summary>
    public int Taken { get; private set; }

    /// <summary>Begins a chunk.</summary>
    public void Start(int firstState)
    {
        (first, Taken) = (firstState, 0);
        for (var lane = 0; lane < Lanes; lane++)
        {
            var state = firstState + lane;
            var counts = state < columns.Count && among[state];
            (at[lane], end[lane]) = counts ? (columns.Offsets[state], columns.Offsets[state + 1]) : (0, 0);
            Look(lane);
        }
    }

    /// <summary>The next offset and the rates there; false at the end of the chunk.</summary>
    public bool Next(Span<double> vector, out int offset)
    {
        offset = None;
        foreach (var o in offsets)
        {
            offset = Math.Min(offset, o);
        }

        for (var lane = 0; lane < Lanes && offset != None; lane++)
        {
            vector[lane] = 0;
            if (offsets[lane] == offset)
            {
                vector[lane] = columns.Values[at[lane]++];
                Taken++;
                Look(lane);
            }
        }

        return offset != None;
    }

    /// <summary>Goes on to a transition that counts.</summary>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    private void Look(int lane)
    {
        while (at[lane] < end[lane] && !(columns.Values[at[lane]] > 0 && among[columns.Targets[at[lane]]]))
        {
            at[lane]++;
        }

        offsets[lane] = at[lane] < end[lane] ? columns.Targets[at[lane]] - (first + lane) : None;
    }
}
