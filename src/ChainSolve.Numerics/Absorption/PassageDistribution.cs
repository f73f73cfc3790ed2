using ChainSolve.Numerics.Arithmetic;
using ChainSolve.Numerics.Estimates;
using ChainSolve.Numerics.Iteration;
using ChainSolve.Numerics.Operators;
using ChainSolve.Numerics.Transient;

namespace ChainSolve.Numerics.Absorption;

/// <summary>The distribution of the time until a set is left, asked time by time. Not safe to share between threads.</summary>
internal sealed class PassageDistribution
{
    // Up to here the matrices of all doublings of time fit in memory.
    private const int LargestKept = 400;

    private readonly TransientProblem problem;
    private readonly double share;
    private readonly Estimate outside;
    private readonly Estimate tail;
    private readonly string? method;
    private readonly IReadOnlyList<ITransientSolver>? solvers;
    private readonly SolveContext context;
    private SquaringRun? run;

    public PassageDistribution(
        Generator generator, double[] start, bool[] alive, double share, string? method, IReadOnlyList<ITransientSolver>? solvers, SolveContext context)
    {
        (this.share, this.method, this.solvers, this.context) = (share, method, solvers, context);
        var leaving = generator.RatesInto([.. alive.Select(a => !a)]);
        problem = new TransientProblem
        {
            Generator = generator,
            Start = start,
            Alive = alive,
            Times = [],
            Rates = [[.. alive.Select(a => a ? 1.0 : 0)], leaving],
            Totals = [leaving],
        };
        outside = Mass(start, alive, isAlive: false);
        tail = (Mass(start, alive, isAlive: true) + outside) - share;
        LargestExit = Enumerable.Range(0, alive.Length).Where(i => alive[i]).Max(i => generator.ExitRates[i]);
    }

    public string Method { get; private set; } = "none";

    public string Why { get; private set; } = "";

    public string How { get; private set; } = "";

    /// <summary>The largest exit rate within the set.</summary>
    public double LargestExit { get; }

    /// <summary>What is known of a time.</summary>
    public PassagePoint At(double time)
    {
        var values = Solve(time);
        var (staying, density) = (values.Rates[0][0], values.Rates[0][1].Value);

        // The sums of rates out of the set were rounded once.
        var left = outside + (values.Totals[0][0] * new Estimate(1, LongSum.Rounding, true));

        // The smaller of the two parts has the smaller error.
        var excess = share <= 0.5 ? left - share : tail - staying;
        return new PassagePoint(time, excess, staying.Value, density, tail.Value);
    }

    private static Estimate Mass(double[] start, bool[] alive, bool isAlive)
    {
        LongSum sum = default;
        for (var i = 0; i < start.Length; i++)
        {
            sum.Add(alive[i] == isAlive ? start[i] : 0);
        }

        return sum.Value is 0 or 1 ? Estimate.Exact(sum.Value) : NonNegative.Relative(sum.Value, LongSum.Rounding, true);
    }

    private TransientResult Solve(double time)
    {
        TransientResult result;
        if (run is not null)
        {
            result = run.At([time], context);
        }
        else
        {
            var asked = problem with { Times = [time] };
            var choice = TransientSolvers.Rank(asked, method, solvers)[0];
            (Method, Why) = (choice.Solver.Name, choice.Why);
            if (choice.Solver is SquaringSolver && problem.Generator.StateCount <= LargestKept)
            {
                run = new SquaringRun(problem, keepsAll: true);
                result = run.At([time], context);
            }
            else
            {
                (result, choice) = TransientSolvers.Solve(asked, method, solvers, context);
                (Method, Why) = (choice.Solver.Name, choice.Why);
            }
        }

        How = result.How;
        return result;
    }
}

/// <summary>The distribution of a time until leaving, seen from a share, at one time.</summary>
/// <param name="Time">The time.</param>
/// <param name="Excess">The chance of having left by then, less the share.</param>
/// <param name="Staying">The chance of not having left.</param>
/// <param name="Density">The density of the time until leaving.</param>
/// <param name="Tail">One less the share.</param>
internal readonly record struct PassagePoint(double Time, Estimate Excess, double Staying, double Density, double Tail)
{
    /// <summary>Whether the quantile is surely later.</summary>
    public bool IsEarly => Excess.Value + Excess.Bound < 0;

    /// <summary>Whether the quantile is surely not later.</summary>
    public bool IsLate => Excess.Value - Excess.Bound >= 0;
}
