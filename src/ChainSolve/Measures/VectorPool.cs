using System.Runtime.InteropServices;

namespace ChainSolve.Measures;

/// <summary>
/// Keeps one array for all that hold the same numbers, so that what is alike can be told by reference. Not safe to share between threads.
/// </summary>
internal sealed class VectorPool
{
    private readonly Dictionary<int, List<Array>> known = [];

    public double[] Intern(double[] vector) => Find(MemoryMarshal.AsBytes(vector.AsSpan()), vector);

    public bool[] Intern(bool[] mask) => Find(MemoryMarshal.AsBytes(mask.AsSpan()), mask);

    private T[] Find<T>(ReadOnlySpan<byte> bytes, T[] array)
        where T : unmanaged
    {
        var hash = new HashCode();
        hash.Add(typeof(T));
        hash.AddBytes(bytes);
        var key = hash.ToHashCode();
        if (!known.TryGetValue(key, out var list))
        {
            known[key] = list = [];
        }

        foreach (var other in list)
        {
            if (other is T[] same && MemoryMarshal.AsBytes(same.AsSpan()).SequenceEqual(bytes))
            {
                return same;
            }
        }

        list.Add(array);
        return array;
    }
}
