using System.Globalization;

namespace ChainSolve.StateSpace;

/// <summary>How much may be explored, and what is said where it is too little.</summary>
/// <param name="States">The most states.</param>
/// <param name="Bytes">The most bytes for states and transitions.</param>
internal readonly record struct ExploreLimits(long States, long Bytes)
{
    private const string HowToMend = "raise the limit (MaxMemory, --max-memory) or write alike things as one item with 'x N'";

    // Row starts, exit rates, and the start distribution with its answer.
    private const long BytesOfAState = 32;

    // A target and a rate.
    private const long BytesOfATransition = 12;

    /// <summary>Throws where states take more memory than there may be.</summary>
    /// <exception cref="LimitExceededException">They do.</exception>
    public void CheckStates(long states, long bytes)
    {
        if (bytes > Bytes)
        {
            throw new LimitExceededException("memory", string.Create(
                CultureInfo.InvariantCulture,
                $"{states:N0} states were found so far and take {Text(bytes)}, more than the {Text(Bytes)} allowed; {HowToMend}"));
        }
    }

    /// <summary>Throws, before any are stored, where transitions would take more memory than there may be.</summary>
    /// <exception cref="LimitExceededException">They would.</exception>
    public void CheckTransitions(long states, long transitions, long bytes)
    {
        var needed = bytes + (states * BytesOfAState) + (transitions * BytesOfATransition);
        if (needed > Bytes)
        {
            throw new LimitExceededException("memory", string.Create(
                CultureInfo.InvariantCulture,
                $"{states:N0} states with {transitions:N0} transitions need at least {Text(needed)}, more than the {Text(Bytes)} allowed; {HowToMend}"));
        }
    }

    private static string Text(long bytes) => string.Create(CultureInfo.InvariantCulture, $"{Math.Ceiling(bytes / 1e5) / 10:#,0.#} MB");
}
