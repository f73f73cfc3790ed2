namespace ChainSolve.Modelling;

/// <summary>One value a given, in the order of the model and in its time base.</summary>
/// <remarks>Immutable; safe to share between threads.</remarks>
internal sealed class GivenValues(double[] values)
{
    private readonly double[] values = values;

    public double this[int given] => values[given];

    public ReadOnlySpan<double> AsSpan() => values;
}
