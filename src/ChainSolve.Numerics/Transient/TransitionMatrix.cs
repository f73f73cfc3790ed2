using ChainSolve.Numerics.Estimates;
using ChainSolve.Numerics.Iteration;
using ChainSolve.Numerics.Operators;

namespace ChainSolve.Numerics.Transient;

/// <summary>The transition matrix P(t) = exp(Qt) of a small chain, with a proved bound for every element.</summary>
/// <remarks>
/// Each element is right to about one rounding of a double, at any time and any ratio of rates; what cannot happen is
/// exactly zero. Immutable; safe to share between threads.
/// </remarks>
public sealed class TransitionMatrix
{
    /// <summary>The largest number of states; work grows with its third power, memory with its second.</summary>
    public const int MaxStates = 3000;

    private readonly WideBlock block;

    private TransitionMatrix(WideBlock block, double time, string how)
    {
        this.block = block;
        Time = time;
        How = how;
    }

    /// <summary>The number of states.</summary>
    public int StateCount => block.Rows;

    /// <summary>The time, in the unit of the rates.</summary>
    public double Time { get; }

    /// <summary>How it was computed, for a reader.</summary>
    public string How { get; }

    /// <summary>The probability to be in one state at the time, having started in another.</summary>
    /// <param name="from">The state of the start, from 0.</param>
    /// <param name="to">The state at the time, from 0.</param>
    /// <exception cref="ArgumentOutOfRangeException">There is no such state.</exception>
    public Estimate this[int from, int to]
    {
        get
        {
            ArgumentOutOfRangeException.ThrowIfNegative(from);
            ArgumentOutOfRangeException.ThrowIfGreaterThanOrEqual(from, StateCount);
            ArgumentOutOfRangeException.ThrowIfNegative(to);
            ArgumentOutOfRangeException.ThrowIfGreaterThanOrEqual(to, StateCount);
            var (value, bound) = block.Rounded(from, to);
            return new Estimate(value, bound, true);
        }
    }

    /// <summary>Computes the matrix.</summary>
    /// <param name="generator">The chain, of at most <see cref="MaxStates"/> states.</param>
    /// <param name="time">The time, finite and not negative, in the unit of the rates.</param>
    /// <param name="context">Cancellation and progress; null for the default.</param>
    /// <exception cref="ArgumentException">The chain is too large, or the time is not finite or negative.</exception>
    /// <exception cref="NotConvergedException">The rates are too small or too large to compute with.</exception>
    /// <exception cref="OperationCanceledException">The context's token was cancelled.</exception>
    public static TransitionMatrix Compute(Generator generator, double time, SolveContext? context = null)
    {
        ArgumentNullException.ThrowIfNull(generator);
        ProblemCheck.Time(time, nameof(time));
        if (generator.StateCount > MaxStates)
        {
            throw new ArgumentException(
                $"The chain has {generator.StateCount} states; a whole matrix is computed for up to {MaxStates}. Ask for single distributions instead.",
                nameof(generator));
        }

        context ??= SolveContext.Default;
        var all = new bool[generator.StateCount];
        Array.Fill(all, true);
        var chain = ReachedChain.Of(generator, all);
        if (time == 0 || chain.LargestExit == 0)
        {
            return new TransitionMatrix(Identity(chain.Count), time, "nothing moves");
        }

        var nothing = new WideBlock(chain.Count, 0);
        var ladder = new TransitionLadder(chain, nothing, keepsAll: false);
        var (levels, rest) = ladder.Split(time);
        var result = rest > 0 ? new ShortStep(chain, rest).All(nothing, context.Cancellation).Matrix : null;
        foreach (var level in levels)
        {
            var matrix = ladder.At(level, context.Cancellation).Matrix;
            result = result is null ? matrix : WideProduct.Of(result, null, matrix, matrix.Pattern, true, context.Cancellation);
            context.Progress?.Report(new SolveProgress("squaring", level + 1, levels[^1] + 1, ""));
        }

        return new TransitionMatrix(result!, time, $"squaring in two doubles, {ladder.LevelCount} levels from a step of 2^{ladder.StepPower}");
    }

    /// <summary>The distribution at the time for one state of the start: a new array.</summary>
    /// <exception cref="ArgumentOutOfRangeException">There is no such state.</exception>
    public double[] Row(int from)
    {
        ArgumentOutOfRangeException.ThrowIfNegative(from);
        ArgumentOutOfRangeException.ThrowIfGreaterThanOrEqual(from, StateCount);
        return block.High.AsSpan(from * StateCount, StateCount).ToArray();
    }

    private static WideBlock Identity(int count)
    {
        var identity = new WideBlock(count, count);
        for (var i = 0; i < count; i++)
        {
            identity.High[(i * count) + i] = 1;
        }

        return identity;
    }
}
