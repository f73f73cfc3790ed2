namespace ChainSolve.StateSpace;

/// <summary>The law of how many of some replicas go one of two ways.</summary>
internal static class BinomialLaw
{
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
