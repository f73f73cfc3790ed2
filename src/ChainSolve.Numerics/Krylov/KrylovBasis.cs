namespace ChainSolve.Numerics.Krylov;

/// <summary>
/// An orthonormal basis of a vector and its images, v, vA, vA², ..., and the small matrix that A is on it (W. E. Arnoldi 1951; orthogonalised twice where
/// the first time takes much away). Holds its memory for the next one; not safe to share between threads.
/// </summary>
internal sealed class KrylovBasis
{
    private readonly double[][] vectors;

    /// <summary>Reserves room.</summary>
    /// <param name="length">The length of a vector.</param>
    /// <param name="most">The largest number of basis vectors.</param>
    public KrylovBasis(int length, int most)
    {
        vectors = new double[most + 1][];
        for (var i = 0; i <= most; i++)
        {
            vectors[i] = new double[length];
        }

        Matrix = new double[most + 1, most];
    }

    /// <summary>How many vectors the basis has; fewer than there is room for where they already hold all images.</summary>
    public int Count { get; private set; }

    /// <summary>Column j has the image of vector j in terms of the basis and of the vector after it.</summary>
    public double[,] Matrix { get; }

    /// <summary>The length of the vector that it was made of.</summary>
    public double Length { get; private set; }

    /// <summary>What the last vector maps to beyond the basis: its length, 0 where the basis is closed.</summary>
    public double Beyond => Matrix[Count, Count - 1];

    /// <summary>A vector of the basis; the one at <see cref="Count"/> is the direction of what lies beyond it.</summary>
    public ReadOnlySpan<double> this[int i] => vectors[i];

    /// <summary>Makes the basis of a vector.</summary>
    /// <param name="start">The vector, not zero.</param>
    /// <param name="apply">Writes the image of the first to the second.</param>
    /// <param name="cancellation">Looked at once a vector.</param>
    public void Make(ReadOnlySpan<double> start, Action<double[], double[]> apply, CancellationToken cancellation)
    {
        Array.Clear(Matrix);
        Length = Math.Sqrt(LaneVectors.Dot(start, start));
        Array.Clear(vectors[0]);
        LaneVectors.AddTo(vectors[0], 1 / Length, start);
        for (Count = 1; Count < vectors.Length; Count++)
        {
            cancellation.ThrowIfCancellationRequested();
            var next = vectors[Count];
            apply(vectors[Count - 1], next);
            var before = Math.Sqrt(LaneVectors.Dot(next, next));
            Orthogonalise(next);
            var length = Math.Sqrt(LaneVectors.Dot(next, next));
            if (length < 0.7 * before)
            {
                Orthogonalise(next);
                length = Math.Sqrt(LaneVectors.Dot(next, next));
            }

            if (length <= before * 1e-15)
            {
                return;
            }

            Matrix[Count, Count - 1] = length;
            for (var i = 0; i < next.Length; i++)
            {
                next[i] /= length;
            }

            if (Count == vectors.Length - 1)
            {
                return;
            }
        }
    }

    private void Orthogonalise(double[] next)
    {
        for (var j = 0; j < Count; j++)
        {
            var part = LaneVectors.Dot(vectors[j], next);
            Matrix[j, Count - 1] += part;
            LaneVectors.AddTo(next, -part, vectors[j]);
        }
    }
}
