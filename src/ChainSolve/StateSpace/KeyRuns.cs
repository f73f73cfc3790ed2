using System.Numerics;

namespace ChainSolve.StateSpace;

/// <summary>What the sets of keys share: keys that are bits of words.</summary>
internal static class KeyRuns
{
    /// <summary>The last place whose value is at most a number; values ascend, and the first is at most the number.</summary>
    public static int LastAtMost(ReadOnlySpan<int> values, int number)
    {
        var (low, high) = (0, values.Length);
        while (high - low > 1)
        {
            var middle = low + ((high - low) / 2);
            (low, high) = values[middle] <= number ? (middle, high) : (low, middle);
        }

        return low;
    }

    /// <summary>Writes the keys of a word as long as there is room.</summary>
    /// <param name="origin">The key of the word's lowest bit.</param>
    /// <param name="word">The word.</param>
    /// <param name="skip">How many keys are passed over first; falls to 0.</param>
    /// <param name="keys">Takes the keys.</param>
    /// <param name="count">How many there are; grows.</param>
    public static void Copy<TKey>(TKey origin, ulong word, ref int skip, Span<TKey> keys, ref int count)
        where TKey : unmanaged, IBinaryInteger<TKey>
    {
        for (; word != 0 && count < keys.Length; word &= word - 1)
        {
            if (skip > 0)
            {
                skip--;
                continue;
            }

            keys[count++] = origin | TKey.CreateTruncating(BitOperations.TrailingZeroCount(word));
        }
    }
}
