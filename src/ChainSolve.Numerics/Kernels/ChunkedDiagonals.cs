using ChainSolve.Numerics.Operators;

namespace ChainSolve.Numerics.Kernels;

/// <summary>
/// The transposed generator in chunks of eight states. A chunk has a list of diagonals; each is an offset from a state to
/// its sources and the code of a vector of eight rates, 0 where a state has no such source. Immutable; safe to share.
/// </summary>
/// <remarks>
/// States that are numbered in the order of their keys have sources at the same few offsets all along, and the same few
/// vectors of rates: 6 bytes stand for up to eight transitions, and loads are of neighbours.
/// </remarks>
internal sealed class ChunkedDiagonals
{
    /// <summary>Beyond this many places a transition, zeros cost more than is gained.</summary>
    private const double MostFill = 2;

    private const int Lanes = StepVectors.Lanes;
    private const int CheckedChunks = 4096;

    private ChunkedDiagonals(int[] starts, int[] offsets, ushort[] codes, (double[] Values, int First) table)
    {
        Starts = starts;
        Offsets = offsets;
        Codes = codes;
        (Table, FirstVector) = table;
    }

    /// <summary>The diagonals of chunk c stand at <c>[Starts[c], Starts[c + 1])</c>.</summary>
    public int[] Starts { get; }

    /// <summary>The number of a source less that of its target, ascending within a chunk.</summary>
    public int[] Offsets { get; }

    /// <summary>The code of the rates.</summary>
    public ushort[] Codes { get; }

    /// <summary>The vectors, code after code.</summary>
    public double[] Table { get; }

    /// <summary>Where the vector of code 0 begins.</summary>
    public int FirstVector { get; }

    /// <summary>Lays out the transitions between states that count; null where the pattern or the rates are too irregular.</summary>
    /// <param name="columns">The rates into each state.</param>
    /// <param name="among">The states that count.</param>
    /// <param name="cancellation">Looked at every few thousand states.</param>
    public static ChunkedDiagonals? TryBuild(SparseRows columns, bool[] among, CancellationToken cancellation)
    {
        var chunkCount = ((columns.Count - 1) / Lanes) + 1;
        var most = (MostFill * columns.EntryCount / Lanes) + chunkCount;
        if (most > Array.MaxLength)
        {
            return null;
        }

        var (starts, offsets, codes) = (new int[chunkCount + 1], new int[(int)most], new ushort[(int)most]);
        var table = new VectorTable();
        var row = new ChunkCursor(columns, among);
        Span<double> vector = stackalloc double[Lanes];
        var (count, entries) = (0, 0L);
        for (var c = 0; c < chunkCount; c++)
        {
            if (c % CheckedChunks == 0)
            {
                cancellation.ThrowIfCancellationRequested();
            }

            row.Start(c * Lanes);
            while (row.Next(vector, out var offset))
            {
                var code = table.CodeOf(vector);
                if (code < 0 || count == offsets.Length)
                {
                    return null;
                }

                (offsets[count], codes[count]) = (offset, (ushort)code);
                count++;
            }

            starts[c + 1] = count;
            entries += row.Taken;
            if (c % CheckedChunks == CheckedChunks - 1 && (double)count * Lanes > MostFill * entries)
            {
                return null;
            }
        }

        if ((double)count * Lanes > MostFill * entries && chunkCount > 1)
        {
            return null;
        }

        Array.Resize(ref offsets, count);
        Array.Resize(ref codes, count);
        return new ChunkedDiagonals(starts, offsets, codes, table.ToAligned());
    }
}
