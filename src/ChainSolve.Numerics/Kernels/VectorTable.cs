using System.Runtime.InteropServices;

namespace ChainSolve.Numerics.Kernels;

/// <summary>Different vectors of eight rates, each with a code in the order in which they came. For one thread while it is filled.</summary>
internal sealed class VectorTable
{
    /// <summary>Codes have 16 bits.</summary>
    public const int MostCodes = 1 << 16;

    private const int Lanes = StepVectors.Lanes;
    private const int Slots = MostCodes * 2;

    private readonly int[] codes = new int[Slots];
    private double[] values = new double[64 * Lanes];

    /// <summary>How many there are.</summary>
    public int Count { get; private set; }

    /// <summary>The code of a vector; -1 where there is no more room.</summary>
    public int CodeOf(ReadOnlySpan<double> vector)
    {
        for (var slot = Hash(vector); ; slot = (slot + 1) % Slots)
        {
            var code = codes[slot] - 1;
            if (code < 0)
            {
                return Add(vector, slot);
            }

            if (vector.SequenceEqual(values.AsSpan(code * Lanes, Lanes)))
            {
                return code;
            }
        }
    }

    /// <summary>All vectors, code after code, from a place of the array whose address is a multiple of 64.</summary>
    public (double[] Values, int First) ToAligned()
    {
        var aligned = GC.AllocateArray<double>((Count + 1) * Lanes, pinned: true);
        var address = (long)Marshal.UnsafeAddrOfPinnedArrayElement(aligned, 0);
        var first = (int)(((64 - (address % 64)) % 64) / sizeof(double));
        values.AsSpan(0, Count * Lanes).CopyTo(aligned.AsSpan(first));
        return (aligned, first);
    }

    private static int Hash(ReadOnlySpan<double> vector)
    {
        var hash = 0UL;
        foreach (var value in vector)
        {
            hash = (hash ^ BitConverter.DoubleToUInt64Bits(value)) * 0x9E3779B97F4A7C15;
            hash ^= hash >> 29;
        }

        return (int)(hash % Slots);
    }

    private int Add(ReadOnlySpan<double> vector, int slot)
    {
        if (Count == MostCodes)
        {
            return -1;
        }

        if ((Count + 1) * Lanes > values.Length)
        {
            Array.Resize(ref values, values.Length * 2);
        }

        vector.CopyTo(values.AsSpan(Count * Lanes));
        codes[slot] = ++Count;
        return Count - 1;
    }
}
