using ChainSolve.Numerics.Operators;

namespace ChainSolve.Numerics.Stationary;

/// <summary>Sweeps over the balance equations of a chain, and the adjoint sweeps that show how far they have come.</summary>
/// <remarks>
/// A sweep over columns takes x to x H. The adjoint sweeps, in the opposite order over rows, have the same speed and a
/// known limit, the constant vectors: the spread of a vector under them is an error that can be seen, while two
/// successive x may be close long before they are right. Not safe to share between threads.
/// </remarks>
internal sealed class StationarySweeps
{
    private readonly SparseRows columns;
    private readonly SparseRows rows;
    private readonly double[] exits;

    public StationarySweeps(Generator generator)
    {
        (columns, rows, exits) = (generator.Columns, generator.Rows, generator.ExitRates);
        X = TreeGuess.Of(generator);
        Before = new double[X.Length];
        Z = new double[X.Length];
        RestartAdjoint();
    }

    /// <summary>The weights.</summary>
    public double[] X { get; }

    /// <summary>The vector whose spread falls as the error of <see cref="X"/> does.</summary>
    public double[] Z { get; }

    /// <summary>The weights before the last call of <see cref="Advance"/> began its last cycle.</summary>
    public double[] Before { get; }

    /// <summary>Cycles that <see cref="X"/> has had; a cycle is a sweep up and a sweep down, or two sweeps up.</summary>
    public int Cycles { get; private set; }

    /// <summary>Runs cycles on the weights.</summary>
    /// <param name="cycles">How many.</param>
    /// <param name="relaxation">1 for Gauss-Seidel, more to overshoot.</param>
    /// <param name="alternates">Whether every second sweep goes down.</param>
    /// <param name="cancellation">Looked at once a sweep.</param>
    public void Advance(int cycles, double relaxation, bool alternates, CancellationToken cancellation)
    {
        for (var c = 0; c < cycles; c++)
        {
            if (c == cycles - 1)
            {
                X.CopyTo(Before, 0);
            }

            cancellation.ThrowIfCancellationRequested();
            Sweep(columns, X, relaxation, false, true);
            cancellation.ThrowIfCancellationRequested();
            Sweep(columns, X, relaxation, alternates, true);
        }

        Cycles += cycles;
    }

    /// <summary>Runs the adjoint cycles.</summary>
    public void AdvanceAdjoint(int cycles, double relaxation, bool alternates, CancellationToken cancellation)
    {
        for (var c = 0; c < cycles; c++)
        {
            cancellation.ThrowIfCancellationRequested();
            Sweep(rows, Z, relaxation, !alternates, false);
            cancellation.ThrowIfCancellationRequested();
            Sweep(rows, Z, relaxation, true, false);
        }
    }

    /// <summary>Fills <see cref="Z"/> with a fixed scatter of numbers between 0 and 1, which has a share in every slow direction.</summary>
    public void RestartAdjoint()
    {
        for (var i = 0; i < Z.Length; i++)
        {
            Z[i] = (((uint)i * 2654435761u) ^ ((uint)i * 40503u >> 7)) % 65536 / 65536.0;
        }
    }

    /// <summary>The largest relative change of a weight in the last cycle.</summary>
    public double LargestChange()
    {
        var largest = 0.0;
        for (var j = 0; j < X.Length; j++)
        {
            var change = Math.Abs(X[j] - Before[j]);
            if (change > largest * X[j] && X[j] > 1e-280)
            {
                largest = change / X[j];
            }
        }

        return largest;
    }

    /// <summary>The difference between the largest and the smallest entry of <see cref="Z"/>.</summary>
    public double Spread()
    {
        var (low, high) = (double.PositiveInfinity, double.NegativeInfinity);
        foreach (var z in Z)
        {
            low = Math.Min(low, z);
            high = Math.Max(high, z);
        }

        return high - low;
    }

    /// <summary>Brings the largest weight near 1 by a power of two, which rounds nothing.</summary>
    public void Rescale()
    {
        var power = Math.ILogB(X.Max());
        if (power == 0)
        {
            return;
        }

        for (var j = 0; j < X.Length; j++)
        {
            X[j] = Math.ScaleB(X[j], -power);
        }
    }

    private void Sweep(SparseRows lines, double[] v, double relaxation, bool isDown, bool staysPositive)
    {
        var (offsets, places, values) = (lines.Offsets, lines.Targets, lines.Values);
        var n = v.Length;
        for (var k = 0; k < n; k++)
        {
            var j = isDown ? n - 1 - k : k;
            var sum = 0.0;
            var end = (int)offsets[j + 1];
            for (var e = (int)offsets[j]; e < end; e++)
            {
                sum += values[e] * v[places[e]];
            }

            var balanced = sum / exits[j];
            var next = v[j] + (relaxation * (balanced - v[j]));
            v[j] = relaxation == 1 || (staysPositive && next <= 0) ? balanced : next;
        }
    }
}
