using System.Numerics;

namespace ChainSolve.StateSpace;

/// <summary>Sorts many keys and can be stopped amid it.</summary>
internal static class KeySort
{
    // What is sorted in one go, without a look at the token: some tens of milliseconds.
    private const int Piece = 1 << 19;

    /// <summary>Sorts distinct keys in their place.</summary>
    /// <remarks>Parts them by their bits from the top (radix exchange) down to pieces that are sorted in one go.</remarks>
    public static void Sort<TKey>(Span<TKey> keys, CancellationToken cancellation)
        where TKey : unmanaged, IBinaryInteger<TKey>
    {
        var used = TKey.Zero;
        foreach (var key in keys)
        {
            used |= key;
        }

        Sort(keys, int.CreateTruncating(TKey.Log2(used | TKey.One)), cancellation);
    }

    private static void Sort<TKey>(Span<TKey> keys, int bit, CancellationToken cancellation)
        where TKey : unmanaged, IBinaryInteger<TKey>
    {
        cancellation.ThrowIfCancellationRequested();
        if (keys.Length <= Piece || bit < 0)
        {
            keys.Sort();
            return;
        }

        var zeros = Part(keys, bit, cancellation);
        Sort(keys[..zeros], bit - 1, cancellation);
        Sort(keys[zeros..], bit - 1, cancellation);
    }

    /// <summary>Brings the keys without a bit before those with it; how many they are.</summary>
    private static int Part<TKey>(Span<TKey> keys, int bit, CancellationToken cancellation)
        where TKey : unmanaged, IBinaryInteger<TKey>
    {
        var (low, high) = (0, keys.Length);
        while (low < high)
        {
            if (low % Piece == 0)
            {
                cancellation.ThrowIfCancellationRequested();
            }

            if ((keys[low] >> bit & TKey.One) == TKey.Zero)
            {
                low++;
            }
            else
            {
                high--;
                (keys[low], keys[high]) = (keys[high], keys[low]);
            }
        }

        return low;
    }
}
