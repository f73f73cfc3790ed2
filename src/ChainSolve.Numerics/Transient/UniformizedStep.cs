using ChainSolve.Numerics.Arithmetic;
using ChainSolve.Numerics.Kernels;
using ChainSolve.Numerics.Operators;

namespace ChainSolve.Numerics.Transient;

/// <summary>
/// The vectors p0 Pᵏ of a uniformized chain, P = I + Q/q, one after the other, and their products with rewards. In two
/// doubles, or in one where the chain is large and many steps are needed. Holds its work space: for one caller at a time.
/// </summary>
/// <remarks>
/// 1/q is a double and q its exact inverse, so that scaling adds no drift. Each element is gathered by one thread in one
/// order, and sums run over fixed chunks: the digits do not depend on the number of threads. States outside of the mask
/// are skipped; what flows to them is lost. Steps on one thread allocate nothing.
/// </remarks>
internal sealed class UniformizedStep
{
    /// <summary>How much q is above the largest exit rate, so that no state is left for sure and periods die out.</summary>
    public const double Margin = 1.02;

    private const int ChunkStates = 8192;

    // Below this many entries a second thread costs more than it saves.
    private const long ParallelEntries = 400_000;

    private readonly IStepKernel kernel;
    private readonly StepVectors vectors;
    private readonly StepScale scale;
    private readonly RewardList[] rewards;
    private readonly int[] listOf;
    private readonly double[] partial;
    private readonly long[] dropped;
    private readonly double[] masses;
    private readonly ParallelOptions? parallel;
    private readonly CancellationToken cancellation;
    private readonly Action<int> work;

    /// <summary>Prepares the first vector.</summary>
    /// <param name="generator">The chain.</param>
    /// <param name="start">The vector to begin with.</param>
    /// <param name="reached">The states that count.</param>
    /// <param name="rewards">What is multiplied with each vector.</param>
    /// <param name="isWide">Whether elements are of two doubles.</param>
    /// <param name="kernel">Takes the steps.</param>
    /// <param name="threads">How many threads may work.</param>
    /// <param name="cancellation">Looked at once a chunk.</param>
    public UniformizedStep(
        Generator generator,
        double[] start,
        bool[] reached,
        IReadOnlyList<double[]> rewards,
        bool isWide,
        IStepKernel kernel,
        int threads,
        CancellationToken cancellation)
    {
        this.cancellation = cancellation;
        var columns = generator.Columns;
        var count = generator.StateCount;
        ChunkCount = ((count - 1) / ChunkStates) + 1;
        var (exits, largest) = Exits(generator, reached);
        Inverse = 1 / (Margin * largest.High);
        Rate = DoubleDouble.One / Inverse;
        IsWide = isWide;
        scale = ScaleOf(exits, reached);
        this.kernel = kernel;
        vectors = new StepVectors(count, isWide);
        for (var i = 0; i < count; i++)
        {
            vectors.Read[i] = reached[i] ? start[i] : 0;
        }

        // The same reward is often asked both as a rate and as a total: it is summed once.
        double[][] distinct = [.. rewards.Distinct(ReferenceEqualityComparer.Instance).Cast<double[]>()];
        this.rewards = [.. distinct.Select(r => new RewardList(r, reached, ChunkStates))];
        listOf = [.. rewards.Select(r => Array.FindIndex(distinct, x => ReferenceEquals(x, r)))];
        partial = new double[ChunkCount * this.rewards.Length];
        dropped = new long[ChunkCount];
        masses = new double[ChunkCount];
        parallel = threads > 1 && ChunkCount > 1 && columns.EntryCount >= ParallelEntries
            ? new ParallelOptions { MaxDegreeOfParallelism = threads, CancellationToken = cancellation }
            : null;
        work = Work;
        MostInto = Enumerable.Range(0, count).Max(j => (int)(columns.Offsets[j + 1] - columns.Offsets[j]));
        Refresh();
    }

    /// <summary>The rate q.</summary>
    public DoubleDouble Rate { get; }

    /// <summary>1/q, exactly.</summary>
    public double Inverse { get; }

    /// <summary>The largest number of transitions into one state.</summary>
    public int MostInto { get; }

    public int ChunkCount { get; }

    /// <summary>The vector, rounded to doubles.</summary>
    public ReadOnlySpan<double> Vector => vectors.Read;

    /// <summary>The vector, and the one before it as the one to be written.</summary>
    public StepVectors Vectors => vectors;

    public bool IsWide { get; }

    /// <summary>
    /// The relative error that one step adds to every element: sums of non-negative products, the entry on the diagonal
    /// (which is at least a fiftieth of q, and carries the rounding of the exit rate), and the scaling.
    /// </summary>
    public double StepError => IsWide
        ? (WideRows.ProductUnits(MostInto + 1) + (51 * 3 * (MostOut + 8)) + 40) * DoubleDouble.Unit
        : (MostInto + 5) * 1.2e-16;

    /// <summary>How many elements were dropped so far; each took less than <see cref="StepScale.Flushed"/> with it.</summary>
    public long DroppedCount => dropped.Sum();

    /// <summary>The sum of the vector, within 1e-9.</summary>
    public double Mass => masses.Sum();

    private int MostOut { get; set; }

    /// <summary>The largest entry of a reward among the states that are reached.</summary>
    public double Largest(int reward) => rewards[listOf[reward]].Largest;

    /// <summary>The vector times a reward, within 2.4e-16 relative of what the vector holds.</summary>
    public double Earned(int reward)
    {
        LongSum sum = default;
        for (var c = 0; c < ChunkCount; c++)
        {
            sum.Add(partial[(c * rewards.Length) + listOf[reward]]);
        }

        return sum.Value;
    }

    /// <summary>Goes one step on.</summary>
    public void Advance()
    {
        if (parallel is null)
        {
            for (var c = 0; c < ChunkCount; c++)
            {
                cancellation.ThrowIfCancellationRequested();
                work(c);
            }
        }
        else
        {
            Parallel.For(0, ChunkCount, parallel, work);
        }

        vectors.Swap();
    }

    /// <summary>Sums anew, after somebody wrote to the vector.</summary>
    public void Refresh()
    {
        for (var c = 0; c < ChunkCount; c++)
        {
            Earn(vectors.Read, c);
            masses[c] = 0;
            foreach (var p in vectors.Read.Slice(c * ChunkStates, Math.Min(ChunkStates, vectors.Count - (c * ChunkStates))))
            {
                masses[c] += p;
            }
        }
    }

    private (DoubleDouble[] Exits, DoubleDouble Largest) Exits(Generator generator, bool[] among)
    {
        var rows = generator.Rows;
        var exits = new DoubleDouble[rows.Count];
        DoubleDouble largest = 0;
        for (var i = 0; i < exits.Length; i++)
        {
            MostOut = Math.Max(MostOut, (int)(rows.Offsets[i + 1] - rows.Offsets[i]));
            for (var e = rows.Offsets[i]; among[i] && e < rows.Offsets[i + 1]; e++)
            {
                exits[i] += rows.Values[e];
            }

            largest = exits[i] > largest ? exits[i] : largest;
        }

        return (exits, largest);
    }

    private StepScale ScaleOf(DoubleDouble[] exits, bool[] reached)
    {
        var length = exits.Length + StepVectors.Lanes;
        var (high, low) = (new double[length], IsWide ? new double[length] : []);
        for (var i = 0; i < exits.Length; i++)
        {
            var stay = reached[i] ? Rate - exits[i] : 0;
            high[i] = stay.High;
            if (IsWide)
            {
                low[i] = stay.Low;
            }
        }

        return new StepScale(high, low, Inverse);
    }

    private void Earn(ReadOnlySpan<double> vector, int chunk)
    {
        for (var r = 0; r < rewards.Length; r++)
        {
            partial[(chunk * rewards.Length) + r] = rewards[r].Sum(vector, chunk);
        }
    }

    private void Work(int chunk)
    {
        var first = chunk * ChunkStates;
        var last = Math.Min(vectors.Count, first + ChunkStates);
        var tally = IsWide ? kernel.Wide(vectors, scale, first, last) : kernel.Plain(vectors, scale, first, last);
        masses[chunk] = tally.Mass;
        dropped[chunk] += tally.Dropped;
        Earn(vectors.Written, chunk);
    }
}
