using System.Globalization;
using ChainSolve.Numerics.Iteration;

namespace ChainSolve.Numerics.Transient;

/// <summary>Gives up on a walk that would take more work than it is worth, judged by how fast what is open narrows. Not safe to share between threads.</summary>
/// <param name="work">The most work, in operations.</param>
/// <param name="stepWork">What a step takes.</param>
internal sealed class Patience(double work, double stepWork)
{
    // Before this share of the work is done there is little to judge by.
    private const double Trial = 0.05;

    private long earlier;
    private double widthThen = double.PositiveInfinity;

    /// <summary>Takes in how wide what is open was after some steps.</summary>
    /// <exception cref="NotConvergedException">Too many more steps would be needed.</exception>
    public void Check(long steps, double width, double goal, double ahead)
    {
        var rate = Math.Log(widthThen / width) / (steps - earlier);
        (earlier, widthThen) = (steps, width);
        var toGo = width <= goal ? 0 : rate > 0 && double.IsFinite(rate) ? Math.Min(ahead, Math.Log(width / goal) / rate) : ahead;
        if (steps * stepWork > Trial * work && (steps + toGo) * stepWork > work)
        {
            throw new NotConvergedException(string.Create(
                CultureInfo.InvariantCulture,
                $"after {steps} steps of uniformization the chain has not settled; about {toGo:g2} more would be needed"));
        }
    }
}
