using ChainSolve.Numerics.Arithmetic;
using ChainSolve.Numerics.Estimates;

namespace ChainSolve.Numerics.Absorption;

/// <summary>Moments of the time.</summary>
public sealed partial class FirstPassage
{
    /// <summary>A raw moment of the time until the set is left: the mean of its k-th power.</summary>
    /// <param name="order">k, from 1 to <see cref="HighestMoment"/>.</param>
    /// <returns>The moment; infinite where the set may never be left.</returns>
    /// <exception cref="ArgumentOutOfRangeException">The order was not announced when solving.</exception>
    /// <exception cref="Iteration.NotConvergedException">The moment is finite but beyond the range of a double.</exception>
    public Estimate Moment(int order)
    {
        ArgumentOutOfRangeException.ThrowIfLessThan(order, 1);
        ArgumentOutOfRangeException.ThrowIfGreaterThan(order, HighestMoment);
        if (!IsCertain)
        {
            return Estimate.Infinite;
        }

        if (order == 1)
        {
            return MeanTime;
        }

        var weights = Array.ConvertAll(momentVectors[order - 2]!, m => order * m);
        if (Array.Exists(weights, w => !double.IsFinite(w)))
        {
            return Finite(Estimate.Infinite);
        }

        // Each solve brings its own error and takes on that of the vector before it, once rounded.
        var relative = order * (bound + LongSum.Rounding);
        return Finite(NonNegative.Dot(Sojourns, weights, relative + (relative * relative), isProved));
    }

    /// <summary>The variance of the time until the set is left; infinite where it may never be left.</summary>
    /// <remarks>
    /// Of two forms the one with the smaller bound is given: the sum over transitions of the expected number of times
    /// each is taken, times the square of the change in the mean time that is left; or the second moment less the square
    /// of the mean. The first has no cancellation, the second is better where there are very many jumps.
    /// </remarks>
    /// <exception cref="InvalidOperationException">Only the mean was announced when solving.</exception>
    /// <exception cref="Iteration.NotConvergedException">The variance is finite but beyond the range of a double.</exception>
    public Estimate Variance()
    {
        if (HighestMoment < 2)
        {
            throw new InvalidOperationException("The variance needs the second moment: solve with highestMoment 2 or more.");
        }

        if (!IsCertain)
        {
            return Estimate.Infinite;
        }

        var bySteps = VarianceBySteps();
        var (mean, second) = (MeanTime, Moment(2));
        var square = mean.Value * mean.Value;
        var byMoments = new Estimate(
            second.Value - square,
            second.Bound + (2 * mean.Value * mean.Bound) + (mean.Bound * mean.Bound) + ((second.Value + square) * LongSum.Rounding),
            isProved);
        return Finite(double.IsFinite(byMoments.Bound) && byMoments.Bound < bySteps.Bound ? byMoments : bySteps);
    }

    private Estimate VarianceBySteps()
    {
        var left = momentVectors[0]!;
        var relative = bound + LongSum.Rounding;
        LongSum sum = default;
        LongSum error = default;

        void AddStep(double weight, double from, double to)
        {
            var change = from - to;
            var changeError = (bound * (from + to)) + (Math.Abs(change) * LongSum.Rounding);
            sum.AddProduct(weight, change * change);
            error.AddProduct(weight, changeError * ((2 * Math.Abs(change)) + changeError));
        }

        var rows = generator.Rows;
        for (var i = 0; i < open.Length; i++)
        {
            for (var e = rows.Offsets[i]; open[i] && e < rows.Offsets[i + 1]; e++)
            {
                AddStep(Sojourns[i] * rows.Values[e], left[i], left[rows.Targets[e]]);
            }
        }

        // Where the chain starts is a chance of its own.
        var mean = MeanTime;
        LongSum starts = default;
        LongSum startError = default;
        for (var i = 0; i < start.Length; i++)
        {
            var change = Math.Abs(left[i] - mean.Value);
            var changeError = (bound * left[i]) + mean.Bound + (change * LongSum.Rounding);
            starts.AddProduct(start[i], change * change);
            startError.AddProduct(start[i], changeError * ((2 * change) + changeError));
        }

        var value = sum.Value + starts.Value;
        return new Estimate(value, (value * (relative + (4 * LongSum.Rounding))) + error.Value + startError.Value, isProved);
    }
}
