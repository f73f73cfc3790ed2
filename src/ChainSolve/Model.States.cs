using System.Globalization;
using ChainSolve.Generators;
using ChainSolve.Numerics.Iteration;
using ChainSolve.Numerics.Stationary;
using ChainSolve.Numerics.Transient;

namespace ChainSolve;

/// <summary>Questions about states.</summary>
public sealed partial class Model
{
    /// <summary>The chances of being in each state after some time, by the state one starts from.</summary>
    /// <param name="time">The time in <see cref="TimeUnit"/>, finite and not negative.</param>
    /// <param name="options">Limits and progress; null for the default.</param>
    /// <param name="cancellation">Stops the call with <see cref="OperationCanceledException"/>.</param>
    /// <remarks>For small chains: work grows with the third power of the number of states, memory with its second.</remarks>
    /// <exception cref="ArgumentOutOfRangeException">The time is negative or not finite.</exception>
    /// <exception cref="ModelFaultsException">A rate has no value in some state.</exception>
    /// <exception cref="LimitExceededException">A limit was hit, or the chain is too large for a matrix.</exception>
    /// <exception cref="NotConvergedException">No value could be given.</exception>
    /// <exception cref="OperationCanceledException">The token was cancelled.</exception>
    public StateMatrix TransitionMatrix(double time, SolveOptions? options = null, CancellationToken cancellation = default)
    {
        CheckTime(time);
        return Call(options, Matrix, cancellation);

        StateMatrix Matrix(Chain chain, SolveOptions used, CancellationToken token)
        {
            var count = chain.Generator.StateCount;
            if (count > Numerics.Transient.TransitionMatrix.MaxStates)
            {
                throw new LimitExceededException("states", string.Create(
                    CultureInfo.InvariantCulture,
                    $"the model has {count:N0} states; a transition matrix is made for up to {Numerics.Transient.TransitionMatrix.MaxStates:N0}: ask for the most likely states instead"));
            }

            var matrix = Numerics.Transient.TransitionMatrix.Compute(chain.Generator, time, used.Context(token));
            return new StateMatrix(this, matrix, [.. Enumerable.Range(0, count).Select(chain.Describe)]);
        }
    }

    /// <summary>The states in which the model most likely is.</summary>
    /// <param name="time">The time in <see cref="TimeUnit"/>, finite and not negative; null for the long run.</param>
    /// <param name="count">How many states are wanted, at least 1; fewer come where the model has fewer.</param>
    /// <param name="options">Methods, limits and progress; null for the default.</param>
    /// <param name="cancellation">Stops the call with <see cref="OperationCanceledException"/>.</param>
    /// <exception cref="ArgumentOutOfRangeException">The time is negative or not finite, or the count is below 1.</exception>
    /// <exception cref="ModelFaultsException">A rate has no value in some state.</exception>
    /// <exception cref="LimitExceededException">A limit was hit.</exception>
    /// <exception cref="NotConvergedException">No value could be given.</exception>
    /// <exception cref="OperationCanceledException">The token was cancelled.</exception>
    public LikelyStates LikelyStates(double? time, int count = 10, SolveOptions? options = null, CancellationToken cancellation = default)
    {
        CheckTime(time ?? 0);
        ArgumentOutOfRangeException.ThrowIfLessThan(count, 1);
        return Call(
            options,
            (chain, used, token) => time is { } t ? LikelyAt(chain, t, count, used, token) : LikelyAtLast(chain, count, used, token),
            cancellation);
    }

    private static void CheckTime(double time)
    {
        if (!double.IsFinite(time) || time < 0)
        {
            throw new ArgumentOutOfRangeException(nameof(time), time, "A time is finite and not negative.");
        }
    }

    private LikelyStates LikelyAt(Chain chain, double time, int count, SolveOptions options, CancellationToken cancellation)
    {
        var problem = new TransientProblem { Generator = chain.Generator, Start = chain.Start, Times = [time], WantsDistributions = true };
        var (result, choice) = Numerics.Transient.TransientSolvers.Solve(
            problem, options.TransientMethod, options.TransientSolvers, options.Context(cancellation));
        return new LikelyStates
        {
            Model = this,
            Time = time,
            States = Rank(chain, result.Distributions![0], i => result.DistributionBounds![0][i], count),
            StateCount = chain.Generator.StateCount,
            Method = choice.Solver.Name,
            How = result.How,
        };
    }

    private LikelyStates LikelyAtLast(Chain chain, int count, SolveOptions options, CancellationToken cancellation)
    {
        var result = LongRun.Solve(chain.Generator, chain.Start, options.Solvers(), options.Context(cancellation));
        return new LikelyStates
        {
            Model = this,
            Time = null,
            States = Rank(chain, result.Limit, i => result.Limit[i] * result.RelativeBound, count),
            StateCount = chain.Generator.StateCount,
            Method = result.StationaryMethod,
            How = result.How,
        };
    }

    private static LikelyState[] Rank(Chain chain, double[] chances, Func<int, double> bound, int count) =>
        [.. Enumerable.Range(0, chances.Length)
            .OrderByDescending(i => chances[i])
            .ThenBy(i => i)
            .Take(count)
            .Select(i => new LikelyState(chain.Describe(i), chances[i], bound(i)))];
}
