namespace ChainSolve.StateSpace;

/// <summary>The law of how many of some replicas go one of two ways.</summary>
internal static class BinomialLaw
{
    /// <summary>The chances of all numbers from 0 on.</summary>
    /// <remarks>Each follows from its neighbour, away from the most likely number. Costs a few operations for each replica.</remarks>
    public static double[] Chances(int count, double goes, double stays)
    {
        var chances = new double[count + 1];
        var likely = (int)Math.Min(count, Math.Floor((count + 1.0) * goes));
        chances[likely] = Chance(count, likely, goes, stays);
        for (var k = likely; k < count && chances[k] > 0; k++)
        {
            chances[k + 1] = chances[k] * ((count - k) * goes) / ((k + 1) * stays);
        }

        for (var k = likely; k > 0 && chances[k] > 0; k--)
        {
            chances[k - 1] = chances[k] * (k * stays) / ((count - k + 1) * goes);
        }

        return chances;
    }

    /// <summary>The chance that of <paramref name="count"/> replicas just <paramref name="taken"/> go.</summary>
    /// <param name="count">How many there are.</param>
    /// <param name="taken">How many go.</param>
    /// <param name="goes">The chance of one to go.</param>
    /// <param name="stays">The chance of one to stay; given apart from the other, so that a small one loses no digits.</param>
    /// <remarks>
    /// The factors are taken in an order that keeps the product near 1 as long as there is a choice, so that it does not overflow, and
    /// underflows only where the chance itself does. Relative error: a rounding or two for each replica.
    /// </remarks>
    public static double Chance(int count, int taken, double goes, double stays)
    {
        var chance = 1.0;
        var stayed = count - taken;
        for (var i = 1; i <= taken; i++)
        {
            for (; chance > 1 && stayed > 0; stayed--)
            {
                chance *= stays;
            }

            chance *= (count - taken + i) * goes / i;
        }

        for (; stayed > 0; stayed--)
        {
            chance *= stays;
        }

        return chance;
    }
}
