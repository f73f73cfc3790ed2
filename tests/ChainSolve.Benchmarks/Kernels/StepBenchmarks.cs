using BenchmarkDotNet.Attributes;
using ChainSolve.Numerics.Kernels;

namespace ChainSolve.Benchmarks.Kernels;

/// <summary>One step of uniformization over a million states: on rows, and on chunked diagonals.</summary>
[ShortRunJob]
public class StepBenchmarks
{
    private const int ChunkStates = 8192;

    private IStepKernel kernel = null!;
    private StepVectors vectors = null!;
    private StepScale scale = null!;

    /// <summary>Whether elements are of two doubles.</summary>
    [Params(false, true)]
    public bool IsWide { get; set; }

    /// <summary>Whether eight states are taken at once.</summary>
    [Params(false, true)]
    public bool IsChunked { get; set; }

    /// <summary>Makes the chain and its first vector.</summary>
    [GlobalSetup]
    public void Prepare()
    {
        var generator = Lattice.Make();
        var among = new bool[generator.StateCount];
        Array.Fill(among, true);
        kernel = IsChunked
            ? new ChunkKernel(ChunkedDiagonals.TryBuild(generator.Columns, among, CancellationToken.None)!)
            : new RowKernel(generator.Columns);
        vectors = new StepVectors(generator.StateCount, IsWide);
        vectors.Read.Fill(1.0 / generator.StateCount);
        var rate = 1.02 * generator.MaxExitRate;
        double[] stays = [.. generator.ExitRates.Select(e => rate - e), .. new double[StepVectors.Lanes]];
        scale = new StepScale(stays, IsWide ? new double[stays.Length] : [], 1 / rate);
    }

    /// <summary>One step.</summary>
    [Benchmark]
    public double Step()
    {
        var mass = 0.0;
        for (var first = 0; first < vectors.Count; first += ChunkStates)
        {
            mass += (IsWide ? kernel.Wide(vectors, scale, first, first + ChunkStates) : kernel.Plain(vectors, scale, first, first + ChunkStates)).Mass;
        }

        vectors.Swap();
        return mass;
    }
}
