using System.Runtime.CompilerServices;
using System.Runtime.InteropServices;
using System.Runtime.Intrinsics;

namespace ChainSolve.Numerics.Kernels;

/// <summary>The step on chunked diagonals, eight states at once. <see cref="RowKernel"/> is its twin.</summary>
/// <remarks>
/// Loads and stores are not checked: chunks and diagonals were checked when they were laid out, and vectors have room at
/// both ends. On machines without vectors of 512 bits the runtime halves them, with the same digits.
/// </remarks>
internal sealed class ChunkKernel(ChunkedDiagonals diagonals) : IStepKernel
{
    private const int Lanes = StepVectors.Lanes;

    public StepCost Cost => new(1.2, 3);

    public StepTally Plain(StepVectors vectors, StepScale scale, int first, int last)
    {
        ref var from = ref Unsafe.Add(ref MemoryMarshal.GetArrayDataReference(vectors.From), Lanes);
        ref var to = ref Unsafe.Add(ref MemoryMarshal.GetArrayDataReference(vectors.To), Lanes);
        ref var stays = ref MemoryMarshal.GetArrayDataReference(scale.Stays);
        ref var table = ref Unsafe.Add(ref MemoryMarshal.GetArrayDataReference(diagonals.Table), diagonals.FirstVector);
        ref var offsets = ref MemoryMarshal.GetArrayDataReference(diagonals.Offsets);
        ref var codes = ref MemoryMarshal.GetArrayDataReference(diagonals.Codes);
        var starts = diagonals.Starts;
        var inverse = Vector512.Create(scale.Inverse);
        var masses = Vector512<double>.Zero;
        var dropped = 0;
        for (var j = first; j < last; j += Lanes)
        {
            ref var here = ref Unsafe.Add(ref from, j);
            var sum = Vector512.LoadUnsafe(ref here) * Vector512.LoadUnsafe(ref stays, (nuint)j);
            var end = starts[(j / Lanes) + 1];
            for (var s = starts[j / Lanes]; s < end; s++)
            {
                var rates = Vector512.LoadUnsafe(ref table, (nuint)(Unsafe.Add(ref codes, s) * Lanes));
                sum = Vector512.FusedMultiplyAdd(rates, Vector512.LoadUnsafe(ref Unsafe.Add(ref here, Unsafe.Add(ref offsets, s))), sum);
            }

            sum *= inverse;
            Drop(ref sum, ref sum, ref dropped);
            sum.StoreUnsafe(ref to, (nuint)j);
            masses += sum;
        }

        return new StepTally(Sum(masses), dropped);
    }

    public StepTally Wide(StepVectors vectors, StepScale scale, int first, int last)
    {
        ref var from = ref Unsafe.Add(ref MemoryMarshal.GetArrayDataReference(vectors.From), Lanes);
        ref var fromLow = ref Unsafe.Add(ref MemoryMarshal.GetArrayDataReference(vectors.FromLow), Lanes);
        ref var to = ref Unsafe.Add(ref MemoryMarshal.GetArrayDataReference(vectors.To), Lanes);
        ref var toLow = ref Unsafe.Add(ref MemoryMarshal.GetArrayDataReference(vectors.ToLow), Lanes);
        ref var stays = ref MemoryMarshal.GetArrayDataReference(scale.Stays);
        ref var staysLow = ref MemoryMarshal.GetArrayDataReference(scale.StaysLow);
        ref var table = ref Unsafe.Add(ref MemoryMarshal.GetArrayDataReference(diagonals.Table), diagonals.FirstVector);
        ref var offsets = ref MemoryMarshal.GetArrayDataReference(diagonals.Offsets);
        ref var codes = ref MemoryMarshal.GetArrayDataReference(diagonals.Codes);
        var starts = diagonals.Starts;
        var inverse = Vector512.Create(scale.Inverse);
        var masses = Vector512<double>.Zero;
        var dropped = 0;
        for (var j = first; j < last; j += Lanes)
        {
            var (value, low) = (Vector512.LoadUnsafe(ref from, (nuint)j), Vector512.LoadUnsafe(ref fromLow, (nuint)j));
            var stay = Vector512.LoadUnsafe(ref stays, (nuint)j);
            var sum = value * stay;
            var rest = Vector512.FusedMultiplyAdd(value, stay, -sum);
            rest = Vector512.FusedMultiplyAdd(value, Vector512.LoadUnsafe(ref staysLow, (nuint)j), rest);
            rest = Vector512.FusedMultiplyAdd(low, stay, rest);
            var end = starts[(j / Lanes) + 1];
            for (var s = starts[j / Lanes]; s < end; s++)
            {
                var rates = Vector512.LoadUnsafe(ref table, (nuint)(Unsafe.Add(ref codes, s) * Lanes));
                var source = j + Unsafe.Add(ref offsets, s);
                value = Vector512.LoadUnsafe(ref Unsafe.Add(ref from, source));
                var product = rates * value;
                var small = Vector512.FusedMultiplyAdd(rates, value, -product);
                small = Vector512.FusedMultiplyAdd(rates, Vector512.LoadUnsafe(ref Unsafe.Add(ref fromLow, source)), small);
                var next = sum + product;
                var part = next - sum;
                rest += (sum - (next - part)) + (product - part) + small;
                sum = next;
            }

            var high = sum + rest;
            low = rest - (high - sum);
            var scaled = high * inverse;
            var scaledLow = Vector512.FusedMultiplyAdd(low, inverse, Vector512.FusedMultiplyAdd(high, inverse, -scaled));
            var result = scaled + scaledLow;
            var resultLow = scaledLow - (result - scaled);
            Drop(ref result, ref resultLow, ref dropped);
            result.StoreUnsafe(ref to, (nuint)j);
            resultLow.StoreUnsafe(ref toLow, (nuint)j);
            masses += result;
        }

        return new StepTally(Sum(masses), dropped);
    }

    /// <summary>Sets to zero, and counts, what is too small to compute with.</summary>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    private static void Drop(ref Vector512<double> high, ref Vector512<double> low, ref int dropped)
    {
        var small = Vector512.LessThan(high, Vector512.Create(StepScale.Flushed)) & Vector512.GreaterThan(high, Vector512<double>.Zero);
        if (small != Vector512<double>.Zero)
        {
            dropped += System.Numerics.BitOperations.PopCount(small.ExtractMostSignificantBits());
            low = Vector512.AndNot(low, small);
            high = Vector512.AndNot(high, small);
        }
    }

    private static double Sum(Vector512<double> lanes)
    {
        var four = lanes.GetLower() + lanes.GetUpper();
        var two = four.GetLower() + four.GetUpper();
        return two[0] + two[1];
    }
}
