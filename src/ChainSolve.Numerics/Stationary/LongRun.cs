using ChainSolve.Numerics.Absorption;
using ChainSolve.Numerics.Arithmetic;
using ChainSolve.Numerics.Estimates;
using ChainSolve.Numerics.Iteration;
using ChainSolve.Numerics.Operators;
using ChainSolve.Numerics.Structure;

namespace ChainSolve.Numerics.Stationary;

/// <summary>
/// The long run of any chain, whatever its structure: its recurrent classes, the chance of ending in each, and the
/// stationary vector of each.
/// </summary>
public static class LongRun
{
    /// <summary>Solves a chain for its long run.</summary>
    /// <param name="generator">The chain.</param>
    /// <param name="start">The start distribution: one probability a state, adding to 1.</param>
    /// <param name="options">Which methods to use; null to choose.</param>
    /// <param name="context">Cancellation, progress and accuracy; null for the default.</param>
    /// <exception cref="ArgumentException">The start is no distribution over the chain, or a method's name is unknown.</exception>
    /// <exception cref="OperationCanceledException">The context's token was cancelled.</exception>
    /// <exception cref="NotConvergedException">No method gave a value.</exception>
    public static LongRunResult Solve(Generator generator, double[] start, SolverOptions? options = null, SolveContext? context = null)
    {
        StartCheck.Distribution(generator, start, nameof(start));
        options ??= SolverOptions.Default;
        context ??= SolveContext.Default;
        var reached = Reachability.From(generator, [.. start.Select(p => p > 0)]);
        var classes = ChainClasses.Of(generator, null, context.Cancellation);
        var ends = classes.Recurrent.Where(c => reached[c[0]]).ToArray();
        var chances = ends.Length == 1 ? Certain(start) : Chances(generator, start, reached, classes, ends, options, context);

        var notes = new List<string>(chances.How is null ? [] : [chances.How]);
        var whys = new List<string>(chances.Why is null ? [] : [chances.Why]);
        var method = "none";
        var result = new RecurrentClass[ends.Length];
        for (var c = 0; c < ends.Length; c++)
        {
            var (vector, choice) = Vector(generator, ends[c], options, context);
            if (choice is not null)
            {
                method = choice.Solver.Name;
                Note(notes, vector.How);
                Note(whys, choice.Why);
            }

            result[c] = new RecurrentClass
            {
                States = ends[c],
                Chance = chances.Values[c],
                Probabilities = vector.Probabilities,
                RelativeBound = vector.RelativeBound,
                IsProved = vector.IsProved,
            };
        }

        return Combine(generator.StateCount, result) with
        {
            StationaryMethod = method,
            AbsorptionMethod = chances.Method,
            How = notes.Count == 0 ? "a single state is reached and never left" : string.Join("; ", notes),
            Why = whys.Count == 0 ? "nothing had to be chosen" : string.Join("; ", whys),
        };
    }

    private static void Note(List<string> notes, string note)
    {
        if (!notes.Contains(note))
        {
            notes.Add(note);
        }
    }

    private static (Estimate[] Values, string Method, string? How, string? Why) Certain(double[] start) =>
        LongSum.Of(start) is 1
            ? ([Estimate.Exact(1)], "none", null, null)
            : ([NonNegative.Relative(LongSum.Of(start), LongSum.Rounding, true)], "none", null, null);

    private static (Estimate[] Values, string Method, string? How, string? Why) Chances(
        Generator generator, double[] start, bool[] reached, ChainClasses classes, int[][] ends, SolverOptions options, SolveContext context)
    {
        var alive = new bool[generator.StateCount];
        foreach (var i in classes.Transient)
        {
            alive[i] = reached[i];
        }

        var problem = new AbsorptionProblem { Generator = generator, Alive = alive, Starts = [start] };
        var isNeeded = alive.Contains(true);
        var (solved, choice) = isNeeded
            ? Attempts.First(
                AbsorptionSolvers.Rank(problem, options.Absorption, options.AbsorptionSolvers), s => s.Solve(problem, context), s => s.Name)
            : (null, null);

        var sums = new LongSum[classes.Recurrent.Count];
        for (var i = 0; i < alive.Length; i++)
        {
            if (classes.ClassOf[i] >= 0)
            {
                sums[classes.ClassOf[i]].Add(start[i]);
            }

            var rows = generator.Rows;
            for (var e = rows.Offsets[i]; alive[i] && e < rows.Offsets[i + 1]; e++)
            {
                if (classes.ClassOf[rows.Targets[e]] >= 0)
                {
                    sums[classes.ClassOf[rows.Targets[e]]].AddProduct(solved!.Sojourns[0][i], rows.Values[e]);
                }
            }
        }

        var bound = LongSum.Rounding + (solved?.RelativeBound ?? 0);
        var values = ends.Select(c => NonNegative.Relative(sums[classes.ClassOf[c[0]]].Value, bound, solved?.IsProved ?? true)).ToArray();
        return (values, choice?.Solver.Name ?? "none", solved?.How, choice?.Why);
    }

    private static (StationaryVector Vector, Choice<IStationarySolver>? Choice) Vector(
        Generator generator, int[] states, SolverOptions options, SolveContext context)
    {
        if (states.Length == 1)
        {
            return (new StationaryVector { Probabilities = [1], RelativeBound = 0, IsProved = true, How = "" }, null);
        }

        var part = Restriction.Of(generator, states).Generator;
        return Attempts.First(
            StationarySolvers.Rank(part, options.Stationary, options.StationarySolvers), s => s.Solve(part, context), s => s.Name);
    }

    private static LongRunResult Combine(int count, RecurrentClass[] classes)
    {
        var limit = new double[count];
        var bound = 0.0;
        foreach (var end in classes)
        {
            for (var k = 0; k < end.States.Length; k++)
            {
                limit[end.States[k]] = end.Chance.Value * end.Probabilities[k];
            }

            var chanceBound = end.Chance.Value == 0 ? 0 : end.Chance.Bound / end.Chance.Value;
            var sum = chanceBound + end.RelativeBound + (end.Chance.Value == 1 ? 0 : LongSum.Rounding);
            bound = Math.Max(bound, sum + (2 * sum * sum));
        }

        return new LongRunResult
        {
            Classes = classes,
            Limit = limit,
            RelativeBound = bound,
            IsProved = classes.All(c => c.IsProved && c.Chance.IsProved),
            StationaryMethod = "none",
            AbsorptionMethod = "none",
            How = "",
            Why = "",
        };
    }
}
