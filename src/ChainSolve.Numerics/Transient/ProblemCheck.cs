using ChainSolve.Numerics.Iteration;
using ChainSolve.Numerics.Operators;

namespace ChainSolve.Numerics.Transient;

/// <summary>Checks what a caller asks.</summary>
internal static class ProblemCheck
{
    // Beyond it products of two doubles have no room.
    private const double LargestResult = 1e280;

    public static void Check(TransientProblem problem)
    {
        ArgumentNullException.ThrowIfNull(problem);
        var generator = problem.Generator;
        ArgumentNullException.ThrowIfNull(generator, nameof(problem.Generator));
        StartCheck.Rewards(generator, problem.Start, nameof(problem.Start));
        if (problem.Alive is { } alive)
        {
            StartCheck.Length(generator, alive, nameof(problem.Alive));
        }

        foreach (var time in problem.Times)
        {
            Time(time, nameof(problem.Times));
        }

        foreach (var reward in problem.Rates)
        {
            StartCheck.Rewards(generator, reward, nameof(problem.Rates));
        }

        foreach (var reward in problem.Totals)
        {
            StartCheck.Rewards(generator, reward, nameof(problem.Totals));
        }
    }

    public static void Time(double time, string name)
    {
        if (!double.IsFinite(time) || time < 0)
        {
            throw new ArgumentException($"A time is {time}; times must be finite and not negative.", name);
        }
    }

    /// <summary>Throws where a result could come near the end of the range of a double.</summary>
    public static void Range(TransientProblem problem, double time)
    {
        foreach (var largest in problem.Rates.Select(r => r.Max()).Concat(problem.Totals.Select(r => r.Max() * Math.Max(1, time))))
        {
            if (!(largest <= LargestResult))
            {
                throw new NotConvergedException($"A reward may come to {largest:g3}, beyond {LargestResult:g1}. Choose another unit for it or for the time.");
            }
        }
    }
}
