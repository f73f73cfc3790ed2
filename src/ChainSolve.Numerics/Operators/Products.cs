namespace ChainSolve.Numerics.Operators;

/// <summary>
/// Products of a generator with a vector or with a block of k vectors, stored state by state (k numbers a state). Every
/// element is summed by one thread in one order, so the digits do not depend on the number of threads.
/// </summary>
internal static class Products
{
    private const int ChunkRows = 8192;

    // Below this a second thread costs more than it saves.
    private const long ParallelEntries = 400_000;

    /// <summary>y = x Q, with the diagonal.</summary>
    public static void Forward(Generator generator, double[] x, double[] y, int threads, CancellationToken cancellation) =>
        Run(generator.Columns, x, y, 1, generator.ExitRates, threads, cancellation);

    /// <summary>y = Q x, with the diagonal.</summary>
    public static void Backward(Generator generator, double[] x, double[] y, int threads, CancellationToken cancellation) =>
        Run(generator.Rows, x, y, 1, generator.ExitRates, threads, cancellation);

    /// <summary>y_j = sum over i of x_i q_ij: what flows into each state.</summary>
    public static void Inflow(Generator generator, double[] x, double[] y, int threads, CancellationToken cancellation) =>
        Run(generator.Columns, x, y, 1, null, threads, cancellation);

    /// <summary>y_i = sum over j of q_ij x_j, without the diagonal.</summary>
    public static void Outlook(Generator generator, double[] x, double[] y, int threads, CancellationToken cancellation) =>
        Run(generator.Rows, x, y, 1, null, threads, cancellation);

    /// <summary>The block form of <see cref="Forward"/>.</summary>
    public static void ForwardBlock(Generator generator, double[] x, double[] y, int width, int threads, CancellationToken cancellation) =>
        Run(generator.Columns, x, y, width, generator.ExitRates, threads, cancellation);

    /// <summary>The block form of <see cref="Backward"/>.</summary>
    public static void BackwardBlock(Generator generator, double[] x, double[] y, int width, int threads, CancellationToken cancellation) =>
        Run(generator.Rows, x, y, width, generator.ExitRates, threads, cancellation);

    private static void Run(
        SparseRows matrix, double[] x, double[] y, int width, double[]? diagonal, int threads, CancellationToken cancellation)
    {
        var chunks = ((matrix.Count - 1) / ChunkRows) + 1;
        if (threads <= 1 || chunks == 1 || matrix.EntryCount * width < ParallelEntries)
        {
            for (var c = 0; c < chunks; c++)
            {
                cancellation.ThrowIfCancellationRequested();
                Chunk(matrix, x, y, width, diagonal, c);
            }

            return;
        }

        var options = new ParallelOptions { MaxDegreeOfParallelism = threads, CancellationToken = cancellation };
        Parallel.For(0, chunks, options, c => Chunk(matrix, x, y, width, diagonal, c));
    }

    private static void Chunk(SparseRows matrix, double[] x, double[] y, int width, double[]? diagonal, int chunk)
    {
        var first = chunk * ChunkRows;
        var last = Math.Min(matrix.Count, first + ChunkRows);
        if (width > 1)
        {
            Block(matrix, x, y, width, diagonal, first, last);
            return;
        }

        var (offsets, targets, values) = (matrix.Offsets, matrix.Targets, matrix.Values);
        for (var i = first; i < last; i++)
        {
            var sum = 0.0;
            var end = (int)offsets[i + 1];
            for (var e = (int)offsets[i]; e < end; e++)
            {
                sum += values[e] * x[targets[e]];
            }

            y[i] = diagonal is null ? sum : sum - (diagonal[i] * x[i]);
        }
    }

    private static void Block(SparseRows matrix, double[] x, double[] y, int width, double[]? diagonal, int first, int last)
    {
        for (var i = first; i < last; i++)
        {
            var sums = y.AsSpan(i * width, width);
            sums.Clear();
            for (var e = matrix.Offsets[i]; e < matrix.Offsets[i + 1]; e++)
            {
                var value = matrix.Values[e];
                var source = x.AsSpan(matrix.Targets[e] * width, width);
                for (var k = 0; k < sums.Length; k++)
                {
                    sums[k] += value * source[k];
                }
            }

            for (var k = 0; diagonal is not null && k < sums.Length; k++)
            {
                sums[k] -= diagonal[i] * x[(i * width) + k];
            }
        }
    }
}
