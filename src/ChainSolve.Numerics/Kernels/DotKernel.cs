using System.Runtime.CompilerServices;
using System.Runtime.InteropServices;
using System.Runtime.Intrinsics;
using ChainSolve.Numerics.Arithmetic;

namespace ChainSolve.Numerics.Kernels;

/// <summary>
/// Sums of products of non-negative numbers, in eight lanes of two doubles each and then over the lanes; off by less than
/// <see cref="LongSum.Rounding"/>, relative.
/// </summary>
internal static class DotKernel
{
    private const int Lanes = StepVectors.Lanes;

    /// <summary>The sum over all elements.</summary>
    /// <param name="values">One factor; finite.</param>
    /// <param name="vector">The other, as long.</param>
    public static double Full(ReadOnlySpan<double> values, ReadOnlySpan<double> vector)
    {
        ref var a = ref MemoryMarshal.GetReference(values);
        ref var b = ref MemoryMarshal.GetReference(vector);
        var whole = Math.Min(values.Length, vector.Length) / Lanes * Lanes;
        var (high, low) = (Vector512<double>.Zero, Vector512<double>.Zero);
        for (var i = 0; i < whole; i += Lanes)
        {
            Add(Vector512.LoadUnsafe(ref a, (nuint)i), Vector512.LoadUnsafe(ref b, (nuint)i), ref high, ref low);
        }

        Span<double> lastValues = stackalloc double[Lanes];
        Span<double> lastVector = stackalloc double[Lanes];
        lastValues.Clear();
        lastVector.Clear();
        values[whole..].CopyTo(lastValues);
        vector[whole..].CopyTo(lastVector);
        Add(Vector512.Create<double>(lastValues), Vector512.Create<double>(lastVector), ref high, ref low);

        LongSum sum = default;
        for (var lane = 0; lane < Lanes; lane++)
        {
            sum.Add(LongSum.Of(high[lane], low[lane]));
        }

        return sum.Value;
    }

    /// <summary>The sum over some elements; the twin of <see cref="Full"/>, with the same digits where all others are zero.</summary>
    /// <param name="places">The elements, ascending.</param>
    /// <param name="values">One factor for each of them; finite.</param>
    /// <param name="vector">The other factor, for all elements.</param>
    public static double At(ReadOnlySpan<int> places, ReadOnlySpan<double> values, ReadOnlySpan<double> vector)
    {
        Span<LongSum> lanes = stackalloc LongSum[Lanes];
        lanes.Clear();
        for (var k = 0; k < places.Length; k++)
        {
            lanes[places[k] % Lanes].AddProduct(values[k], vector[places[k]]);
        }

        LongSum sum = default;
        foreach (var lane in lanes)
        {
            sum.Add(lane);
        }

        return sum.Value;
    }

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    private static void Add(Vector512<double> a, Vector512<double> b, ref Vector512<double> high, ref Vector512<double> low)
    {
        var product = a * b;
        low += Vector512.FusedMultiplyAdd(a, b, -product);
        var sum = high + product;
        var part = sum - high;
        low += high - (sum - part) + (product - part);
        high = sum;
    }
}
