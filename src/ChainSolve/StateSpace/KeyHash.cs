using System.Numerics;

namespace ChainSolve.StateSpace;

/// <summary>Spreads keys; the upper bits are the better ones.</summary>
internal static class KeyHash
{
    // Multiplication by an odd number near 2^64 over the golden ratio spreads neighbouring keys (Knuth, The Art of Computer Programming 3, 6.4).
    public static ulong Of<TKey>(TKey key)
        where TKey : unmanaged, IBinaryInteger<TKey>
    {
        var low = ulong.CreateTruncating(key);
        var high = typeof(TKey) == typeof(ulong) ? 0 : ulong.CreateTruncating(key >> 32) >> 32 | ulong.CreateTruncating(key >> 64) & 0xffffffff00000000UL;
        return (low ^ (high * 0xff51afd7ed558ccdUL)) * 0x9e3779b97f4a7c15UL;
    }
}
