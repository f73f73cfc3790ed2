namespace ChainSolve.Numerics.Kernels;

/// <summary>
/// The vector that a step reads and the one that it writes, in two doubles an element or in one. There is room around the
/// elements, so that a kernel may load and store eight at a time at any of them; that room stays zero.
/// </summary>
internal sealed class StepVectors
{
    /// <summary>How many elements a kernel takes at once.</summary>
    public const int Lanes = 8;

    public StepVectors(int count, bool isWide)
    {
        Count = count;
        var length = count + (3 * Lanes);
        (From, To) = (new double[length], new double[length]);
        (FromLow, ToLow) = isWide ? (new double[length], new double[length]) : ([], []);
    }

    /// <summary>The number of elements.</summary>
    public int Count { get; }

    /// <summary>High parts of the vector that is read; element i stands at <c>i + Lanes</c>.</summary>
    public double[] From { get; private set; }

    /// <summary>Its low parts; empty where elements are one double.</summary>
    public double[] FromLow { get; private set; }

    /// <summary>High parts of the vector that is written.</summary>
    public double[] To { get; private set; }

    /// <summary>Its low parts.</summary>
    public double[] ToLow { get; private set; }

    /// <summary>The elements of the vector that is read, rounded to doubles.</summary>
    public Span<double> Read => From.AsSpan(Lanes, Count);

    /// <summary>The elements of the vector that is written, rounded to doubles.</summary>
    public Span<double> Written => To.AsSpan(Lanes, Count);

    /// <summary>What was written is read next.</summary>
    public void Swap()
    {
        (From, To) = (To, From);
        (FromLow, ToLow) = (ToLow, FromLow);
    }
}
