using ChainSolve.Numerics.Arithmetic;
using ChainSolve.Numerics.Operators;

namespace ChainSolve.Numerics.Stationary;

/// <summary>Turns weights into probabilities.</summary>
internal static class Normalised
{
    /// <summary>The rounding of one number to a double, with room for the sum of the weights.</summary>
    public const double Rounding = 1.12e-16;

    public static StationaryVector Vector(WideNumber[] weights, double relativeBound, string how)
    {
        var sum = WideNumber.Zero;
        foreach (var weight in weights)
        {
            sum += weight;
        }

        var probabilities = new double[weights.Length];
        for (var i = 0; i < weights.Length; i++)
        {
            probabilities[i] = (weights[i] / sum).ToDouble();
        }

        return new StationaryVector
        {
            Probabilities = probabilities,
            RelativeBound = Rounding + relativeBound + (weights.Length * WideNumber.Epsilon),
            IsProved = true,
            How = how,
        };
    }

    /// <summary>Of weights in doubles, whose error was estimated.</summary>
    public static StationaryVector Estimated(double[] weights, double relativeError, string how)
    {
        var sum = LongSum.Of(weights);
        return new StationaryVector
        {
            Probabilities = Array.ConvertAll(weights, x => x / sum),
            RelativeBound = relativeError + (4 * Rounding),
            IsProved = false,
            How = how,
        };
    }

    /// <summary>The answer for a chain of one state, for iterations; null for others.</summary>
    /// <exception cref="ArgumentException">A state of several is never left.</exception>
    public static StationaryVector? Trivial(Generator generator)
    {
        if (generator.StateCount == 1)
        {
            return new StationaryVector { Probabilities = [1], RelativeBound = 0, IsProved = true, How = "one state" };
        }

        return Array.IndexOf(generator.ExitRates, 0) is var stuck and >= 0
            ? throw new ArgumentException($"State {stuck} is never left. Take closed classes apart before solving.", nameof(generator))
            : null;
    }
}
