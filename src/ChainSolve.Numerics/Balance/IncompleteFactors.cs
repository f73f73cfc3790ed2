using ChainSolve.Numerics.Operators;

namespace ChainSolve.Numerics.Balance;

/// <summary>Incomplete factors, without fill, of the balance equations of a chain in which one state is fixed.</summary>
/// <remarks>
/// The matrix has ones on the diagonal and minus the inflow rates over the exit rate of their target beside it. It is an
/// M-matrix, so the factors exist (Meijerink and van der Vorst 1977; from memory). Immutable once made.
/// </remarks>
internal sealed class IncompleteFactors
{
    private readonly SparseRows pattern;
    private readonly int fixedState;
    private readonly double[] values;
    private readonly double[] pivots;

    private IncompleteFactors(Generator generator, int fixedState)
    {
        (pattern, this.fixedState) = (generator.Columns, fixedState);
        values = new double[pattern.EntryCount];
        pivots = new double[pattern.Count];
    }

    public static IncompleteFactors Of(Generator generator, int fixedState, CancellationToken cancellation)
    {
        var factors = new IncompleteFactors(generator, fixedState);
        var place = new int[generator.StateCount];
        Array.Fill(place, -1);
        for (var j = 0; j < place.Length; j++)
        {
            if ((j & 16383) == 0)
            {
                cancellation.ThrowIfCancellationRequested();
            }

            factors.Factor(j, generator.ExitRates[j], place);
        }

        return factors;
    }

    /// <summary>Solves with both factors, in place.</summary>
    public void Solve(double[] v)
    {
        for (var j = 0; j < v.Length; j++)
        {
            var sum = v[j];
            for (var e = (int)pattern.Offsets[j]; e < pattern.Offsets[j + 1] && pattern.Targets[e] < j; e++)
            {
                sum -= values[e] * v[pattern.Targets[e]];
            }

            v[j] = sum;
        }

        for (var j = v.Length - 1; j >= 0; j--)
        {
            var sum = v[j];
            for (var e = (int)pattern.Offsets[j + 1] - 1; e >= pattern.Offsets[j] && pattern.Targets[e] > j; e--)
            {
                sum -= values[e] * v[pattern.Targets[e]];
            }

            v[j] = sum / pivots[j];
        }
    }

    private void Factor(int j, double exitRate, int[] place)
    {
        pivots[j] = 1;
        if (j == fixedState)
        {
            return;
        }

        var (first, end) = ((int)pattern.Offsets[j], (int)pattern.Offsets[j + 1]);
        for (var e = first; e < end; e++)
        {
            values[e] = pattern.Targets[e] == fixedState ? 0 : -pattern.Values[e] / exitRate;
            place[pattern.Targets[e]] = e;
        }

        for (var e = first; e < end && pattern.Targets[e] < j; e++)
        {
            var i = pattern.Targets[e];
            values[e] /= pivots[i];
            for (var f = (int)pattern.Offsets[i + 1] - 1; f >= pattern.Offsets[i] && pattern.Targets[f] > i; f--)
            {
                var k = pattern.Targets[f];
                if (k == j)
                {
                    pivots[j] -= values[e] * values[f];
                }
                else if (place[k] >= 0)
                {
                    values[place[k]] -= values[e] * values[f];
                }
            }
        }

        // Rounding may eat a pivot of a nearly uncoupled state; any positive one will do for an approximation.
        pivots[j] = Math.Max(pivots[j], 1e-10);
        for (var e = first; e < end; e++)
        {
            place[pattern.Targets[e]] = -1;
        }
    }
}
