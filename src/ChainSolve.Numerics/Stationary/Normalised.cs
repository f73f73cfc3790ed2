using ChainSolve.Numerics.Arithmetic;

namespace ChainSolve.Numerics.Stationary;

/// <summary>Turns weights in extended precision into probabilities.</summary>
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
}
