using ChainSolve.Numerics.Operators;

namespace ChainSolve.Numerics.Stationary;

/// <summary>
/// A first guess of a stationary vector: along a tree of transitions every state gets its parent's weight times the
/// ratio of the rates between them. Right for reversible chains, and of the right order for most others, so that tiny
/// probabilities do not start tens of powers of ten too high.
/// </summary>
internal static class TreeGuess
{
    private const double LowestLog = -650;

    /// <summary>Weights of which the largest is 1.</summary>
    public static double[] Of(Generator generator)
    {
        var (rows, n) = (generator.Rows, generator.StateCount);
        var logs = new double[n];
        var seen = new bool[n];
        var queue = new int[n];
        seen[0] = true;
        var found = 1;
        var highest = 0.0;
        for (var done = 0; done < found; done++)
        {
            var i = queue[done];
            for (var e = rows.Offsets[i]; e < rows.Offsets[i + 1]; e++)
            {
                var j = rows.Targets[e];
                if (seen[j] || rows.Values[e] == 0)
                {
                    continue;
                }

                var back = rows.Find(j, i);
                logs[j] = logs[i] + Math.Log(rows.Values[e] / (back > 0 ? back : generator.ExitRates[j]));
                highest = Math.Max(highest, logs[j]);
                seen[j] = true;
                queue[found++] = j;
            }
        }

        return Array.ConvertAll(logs, log => Math.Exp(Math.Max(log - highest, LowestLog)));
    }
}
