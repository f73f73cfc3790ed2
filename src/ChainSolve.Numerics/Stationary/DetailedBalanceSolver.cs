using ChainSolve.Numerics.Arithmetic;
using ChainSolve.Numerics.Iteration;
using ChainSolve.Numerics.Operators;

namespace ChainSolve.Numerics.Stationary;

/// <summary>
/// For reversible chains, such as independent items that fail and are repaired: probabilities along a tree of
/// transitions, each the ratio of a rate to its opposite, then a check of the balance p_i q_ij = p_j q_ji of every pair.
/// </summary>
/// <remarks>
/// The bound is proved: what was found is exactly right for a chain whose rates differ by the largest imbalance d seen,
/// and by the Markov chain tree theorem that changes no probability by more than 2nd, relative.
/// </remarks>
internal sealed class DetailedBalanceSolver : IStationarySolver
{
    private const double LargestBound = 1e-13;

    public string Name => "detailed-balance";

    public double Cost(Generator generator) =>
        TryWeights(generator, CancellationToken.None) is null
            ? double.PositiveInfinity
            : 100.0 * (generator.TransitionCount + generator.StateCount);

    public StationaryVector Solve(Generator generator, SolveContext context)
    {
        if (TryWeights(generator, context.Cancellation) is not { } found)
        {
            throw new NotConvergedException("The chain is not reversible, at least not to 1e-13; detailed balance does not hold.");
        }

        return Normalised.Vector(found.Weights, found.Bound, $"detailed balance of {generator.TransitionCount / 2} pairs of transitions");
    }

    private static (WideNumber[] Weights, double Bound)? TryWeights(Generator generator, CancellationToken cancellation)
    {
        var (rows, columns) = (generator.Rows, generator.Columns);
        var n = generator.StateCount;
        var weights = new WideNumber[n];
        weights[0] = WideNumber.One;
        var queue = new int[n];
        var found = 1;
        for (var done = 0; done < found; done++)
        {
            if ((done & 8191) == 0)
            {
                cancellation.ThrowIfCancellationRequested();
            }

            var i = queue[done];
            if (rows.Offsets[i + 1] - rows.Offsets[i] != columns.Offsets[i + 1] - columns.Offsets[i])
            {
                return null;
            }

            // Both lists ascend, so that in a reversible chain they run side by side.
            for (long e = rows.Offsets[i], c = columns.Offsets[i]; e < rows.Offsets[i + 1]; e++, c++)
            {
                var j = rows.Targets[e];
                if (columns.Targets[c] != j || (rows.Values[e] == 0) != (columns.Values[c] == 0))
                {
                    return null;
                }

                if (rows.Values[e] > 0 && weights[j].IsZero)
                {
                    weights[j] = weights[i] * rows.Values[e] / columns.Values[c];
                    queue[found++] = j;
                }
            }
        }

        if (found < n)
        {
            return null;
        }

        var imbalance = 0.0;
        for (var i = 0; i < n; i++)
        {
            for (long e = rows.Offsets[i], c = columns.Offsets[i]; e < rows.Offsets[i + 1]; e++, c++)
            {
                var j = rows.Targets[e];
                if (j < i || rows.Values[e] == 0)
                {
                    continue;
                }

                imbalance = Math.Max(imbalance, (weights[i] * rows.Values[e] / (weights[j] * columns.Values[c])).DistanceFromOne());
                if (imbalance * 2 * n > LargestBound)
                {
                    return null;
                }
            }
        }

        return (weights, 2.0 * n * (imbalance + (4 * WideNumber.Epsilon)));
    }
}
