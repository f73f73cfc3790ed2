using ChainSolve.Numerics.Arithmetic;
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
    /// <summary>Elements below this are dropped, and counted.</summary>
    public const double Flushed = 1e-300;

    /// <summary>How much q is above the largest exit rate, so that no state is left for sure and periods die out.</summary>
    public const double Margin = 1.02;

    private const int ChunkStates = 8192;

    // Below this many entries a second thread costs more than it saves.
    private const long ParallelEntries = 400_000;

    private readonly SparseRows columns;
    private readonly bool[] reached;
    private readonly double[] stays;
    private readonly double[]? staysLow;
    private readonly RewardList[] rewards;
    private readonly int[] listOf;
    private readonly double[] partial;
    private readonly long[] dropped;
    private readonly double[] masses;
    private readonly ParallelOptions? parallel;
    private readonly CancellationToken cancellation;
    private readonly Action<int> work;
    private double[] x;
    private double[] y;
    private double[] xLow;
    private double[] yLow;

    public UniformizedStep(
        Generator generator, double[] start, bool[] reached, IReadOnlyList<double[]> rewards, bool isWide, int threads, CancellationToken cancellation)
    {
        columns = generator.Columns;
        this.reached = reached;
        this.cancellation = cancellation;
        var count = generator.StateCount;
        ChunkCount = ((count - 1) / ChunkStates) + 1;
        var (exits, largest) = Exits(generator, reached);
        Inverse = 1 / (Margin * largest.High);
        Rate = DoubleDouble.One / Inverse;
        stays = new double[count];
        staysLow = isWide ? new double[count] : null;
        for (var i = 0; i < count; i++)
        {
            var stay = Rate - exits[i];
            stays[i] = stay.High;
            if (isWide)
            {
                staysLow![i] = stay.Low;
            }
        }

        (x, y) = (new double[count], new double[count]);
        (xLow, yLow) = isWide ? (new double[count], new double[count]) : ([], []);
        for (var i = 0; i < count; i++)
        {
            x[i] = reached[i] ? start[i] : 0;
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
        work = isWide ? WideChunk : PlainChunk;
        MostInto = Enumerable.Range(0, count).Max(j => (int)(columns.Offsets[j + 1] - columns.Offsets[j]));
        for (var c = 0; c < ChunkCount; c++)
        {
            Earn(x, c);
            masses[c] = x.AsSpan(c * ChunkStates, Math.Min(ChunkStates, count - (c * ChunkStates))).ToArray().Sum();
        }
    }

    /// <summary>The rate q.</summary>
    public DoubleDouble Rate { get; }

    /// <summary>1/q, exactly.</summary>
    public double Inverse { get; }

    /// <summary>The largest number of transitions into one state.</summary>
    public int MostInto { get; }

    public int ChunkCount { get; }

    /// <summary>The vector, rounded to doubles.</summary>
    public double[] Vector => x;

    public bool IsWide => staysLow is not null;

    /// <summary>
    /// The relative error that one step adds to every element: sums of non-negative products, the entry on the diagonal
    /// (which is at least a fiftieth of q, and carries the rounding of the exit rate), and the scaling.
    /// </summary>
    public double StepError => IsWide
        ? (WideRows.ProductUnits(MostInto + 1) + (51 * 3 * (MostOut + 8)) + 40) * DoubleDouble.Unit
        : (MostInto + 5) * 1.2e-16;

    /// <summary>How many elements were dropped so far; each took less than <see cref="Flushed"/> with it.</summary>
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

        (x, y) = (y, x);
        (xLow, yLow) = (yLow, xLow);
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

    private void Earn(double[] vector, int chunk)
    {
        for (var r = 0; r < rewards.Length; r++)
        {
            partial[(chunk * rewards.Length) + r] = rewards[r].Sum(vector, chunk);
        }
    }

    private void PlainChunk(int chunk)
    {
        var (offsets, sources, rates) = (columns.Offsets, columns.Targets, columns.Values);
        var (from, to) = (x, y);
        var last = Math.Min(from.Length, (chunk + 1) * ChunkStates);
        var mass = 0.0;
        for (var j = chunk * ChunkStates; j < last; j++)
        {
            if (!reached[j])
            {
                continue;
            }

            var sum = from[j] * stays[j];
            var end = (int)offsets[j + 1];
            for (var e = (int)offsets[j]; e < end; e++)
            {
                sum += rates[e] * from[sources[e]];
            }

            sum *= Inverse;
            if (sum < Flushed && sum > 0)
            {
                sum = 0;
                dropped[chunk]++;
            }

            to[j] = sum;
            mass += sum;
        }

        masses[chunk] = mass;
        Earn(to, chunk);
    }

    private void WideChunk(int chunk)
    {
        var (offsets, sources, rates) = (columns.Offsets, columns.Targets, columns.Values);
        var (from, fromLow, to, toLow) = (x, xLow, y, yLow);
        var last = Math.Min(from.Length, (chunk + 1) * ChunkStates);
        var mass = 0.0;
        for (var j = chunk * ChunkStates; j < last; j++)
        {
            if (!reached[j])
            {
                continue;
            }

            var sum = from[j] * stays[j];
            var rest = Math.FusedMultiplyAdd(from[j], stays[j], -sum);
            rest = Math.FusedMultiplyAdd(from[j], staysLow![j], rest);
            rest = Math.FusedMultiplyAdd(fromLow[j], stays[j], rest);
            var end = (int)offsets[j + 1];
            for (var e = (int)offsets[j]; e < end; e++)
            {
                var (rate, value) = (rates[e], from[sources[e]]);
                var product = rate * value;
                var small = Math.FusedMultiplyAdd(rate, value, -product);
                small = Math.FusedMultiplyAdd(rate, fromLow[sources[e]], small);
                var next = sum + product;
                var part = next - sum;
                rest += (sum - (next - part)) + (product - part) + small;
                sum = next;
            }

            var scaled = DoubleDouble.Of(sum, rest) * Inverse;
            if (scaled.High < Flushed && scaled.High > 0)
            {
                scaled = 0;
                dropped[chunk]++;
            }

            (to[j], toLow[j]) = (scaled.High, scaled.Low);
            mass += scaled.High;
        }

        masses[chunk] = mass;
        Earn(to, chunk);
    }
}
