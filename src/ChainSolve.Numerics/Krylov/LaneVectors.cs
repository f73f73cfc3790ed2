using System.Runtime.InteropServices;
using System.Runtime.Intrinsics;

namespace ChainSolve.Numerics.Krylov;

/// <summary>Sums over whole vectors, in eight lanes and then over the lanes: the same digits whatever the machine. Safe to share between threads.</summary>
internal static class LaneVectors
{
    /// <summary>The sum of products.</summary>
    public static double Dot(ReadOnlySpan<double> a, ReadOnlySpan<double> b)
    {
        var left = MemoryMarshal.Cast<double, Vector512<double>>(a);
        var right = MemoryMarshal.Cast<double, Vector512<double>>(b);
        var lanes = Vector512<double>.Zero;
        for (var i = 0; i < left.Length; i++)
        {
            lanes = Vector512.FusedMultiplyAdd(left[i], right[i], lanes);
        }

        var sum = 0.0;
        for (var i = left.Length * Vector512<double>.Count; i < a.Length; i++)
        {
            sum = Math.FusedMultiplyAdd(a[i], b[i], sum);
        }

        return sum + Sum(lanes);
    }

    /// <summary>The sum of absolute values.</summary>
    public static double OneNorm(ReadOnlySpan<double> a)
    {
        var lanes = Vector512<double>.Zero;
        var whole = MemoryMarshal.Cast<double, Vector512<double>>(a);
        foreach (var v in whole)
        {
            lanes += Vector512.Abs(v);
        }

        var sum = Sum(lanes);
        for (var i = whole.Length * Vector512<double>.Count; i < a.Length; i++)
        {
            sum += Math.Abs(a[i]);
        }

        return sum;
    }

    /// <summary>Adds a multiple of one vector to another.</summary>
    public static void AddTo(Span<double> to, double factor, ReadOnlySpan<double> a)
    {
        var target = MemoryMarshal.Cast<double, Vector512<double>>(to);
        var source = MemoryMarshal.Cast<double, Vector512<double>>(a);
        var factors = Vector512.Create(factor);
        for (var i = 0; i < target.Length; i++)
        {
            target[i] = Vector512.FusedMultiplyAdd(factors, source[i], target[i]);
        }

        for (var i = target.Length * Vector512<double>.Count; i < to.Length; i++)
        {
            to[i] = Math.FusedMultiplyAdd(factor, a[i], to[i]);
        }
    }

    private static double Sum(Vector512<double> lanes)
    {
        var four = lanes.GetLower() + lanes.GetUpper();
        var two = four.GetLower() + four.GetUpper();
        return two[0] + two[1];
    }
}
