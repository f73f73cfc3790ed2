using ChainSolve.Numerics.Arithmetic;

namespace ChainSolve.Numerics.Operators;

/// <summary>Checks arguments that go with a chain.</summary>
internal static class StartCheck
{
    /// <summary>A start distribution has one probability a state, and they add to one.</summary>
    public static void Distribution(Generator generator, double[] start, string name)
    {
        ArgumentNullException.ThrowIfNull(generator);
        Rewards(generator, start, name);
        var sum = LongSum.Of(start);
        if (Math.Abs(sum - 1) > 1e-9)
        {
            throw new ArgumentException($"The probabilities add to {sum}, not to 1.", name);
        }
    }

    /// <summary>A reward vector has one finite number a state, none negative.</summary>
    public static void Rewards(Generator generator, double[] values, string name)
    {
        Length(generator, values, name);
        for (var i = 0; i < values.Length; i++)
        {
            if (!double.IsFinite(values[i]) || values[i] < 0)
            {
                throw new ArgumentException($"The number of state {i} is {values[i]}; it must be finite and not negative.", name);
            }
        }
    }

    /// <summary>A vector has one entry a state.</summary>
    public static void Length<T>(Generator generator, T[] values, string name)
    {
        ArgumentNullException.ThrowIfNull(values, name);
        if (values.Length != generator.StateCount)
        {
            throw new ArgumentException($"There are {values.Length} entries for {generator.StateCount} states.", name);
        }
    }
}
