using ChainSolve.Numerics.Operators;

namespace ChainSolve.Numerics.Transient;

/// <summary>Checks what a caller asks.</summary>
internal static class ProblemCheck
{
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
}
