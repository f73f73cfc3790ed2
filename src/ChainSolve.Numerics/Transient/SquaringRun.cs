using ChainSolve.Numerics.Arithmetic;
using ChainSolve.Numerics.Estimates;
using ChainSolve.Numerics.Iteration;

namespace ChainSolve.Numerics.Transient;

/// <summary>
/// One chain, start and set of rewards, ready to be asked at any times: what was squared for earlier times is kept on demand.
/// Not safe to share between threads.
/// </summary>
internal sealed class SquaringRun
{
    /// <summary>The largest number of states reached; a matrix of so many takes some hundred megabytes.</summary>
    public const int MaxStates = 3000;

    private readonly TransientProblem problem;
    private readonly TransitionLadder? ladder;
    private readonly WideBlock start;
    private readonly DoubleDouble mass;
    private readonly WideBlock rates;
    private readonly WideBlock totals;

    /// <summary>Prepares a run; hardly anything is computed yet.</summary>
    /// <param name="problem">What is asked; its times do not matter.</param>
    /// <param name="keepsAll">Whether further times will be asked later; costs the memory of a matrix a doubling of time.</param>
    public SquaringRun(TransientProblem problem, bool keepsAll)
    {
        ProblemCheck.Check(problem);
        this.problem = problem;
        var reached = ReachedChain.Reach(problem.Generator, problem.Start, problem.Alive);
        var count = reached.Count(r => r);
        if (count > MaxStates)
        {
            throw new NotConvergedException($"Squaring would need matrices of {count} states; it is meant for up to {MaxStates}. Choose another method.");
        }

        var chain = count == 0 ? null : ReachedChain.Of(problem.Generator, reached);
        int[] states = chain?.States ?? [];
        start = new WideBlock(1, chain?.Count ?? 0);
        for (var k = 0; k < states.Length; k++)
        {
            start.High[k] = problem.Start[states[k]];
            mass += start.High[k];
        }

        rates = WideBlock.FromColumns(problem.Rates, states, start.Columns);
        totals = WideBlock.FromColumns(problem.Totals, states, start.Columns);
        ladder = chain is { LargestExit: > 0 } ? new TransitionLadder(chain, totals, keepsAll) : null;
    }

    /// <summary>The values at some times, in their order.</summary>
    /// <exception cref="NotConvergedException">A total is beyond the range of a double.</exception>
    public TransientResult At(IReadOnlyList<double> times, SolveContext context)
    {
        double[] distinct = [.. times.Distinct().Order()];
        foreach (var time in distinct)
        {
            ProblemCheck.Time(time, nameof(times));
            ProblemCheck.Range(problem, time);
        }

        var answers = new Dictionary<double, TimeAnswer>();
        if (ladder is null || distinct.All(t => t == 0))
        {
            Array.ForEach(distinct, t => answers[t] = TimeAnswer.Still(problem, t));
            return TimeAnswer.Gather(times, answers, problem.WantsDistributions, "nothing moves");
        }

        var rows = Climb(distinct, ladder, context);
        for (var i = 0; i < distinct.Length; i++)
        {
            answers[distinct[i]] = distinct[i] == 0 ? TimeAnswer.Still(problem, 0) : Read(ladder.Chain, rows[i], context);
        }

        return TimeAnswer.Gather(
            times, answers, problem.WantsDistributions,
            $"squaring in two doubles, {start.Columns} states, {ladder.LevelCount} levels from a step of 2^{ladder.StepPower}");
    }

    /// <summary>The distributions and totals at ascending times. Levels are met once, ascending, so that none need be kept.</summary>
    private (WideBlock Row, WideBlock Totals)[] Climb(double[] times, TransitionLadder steps, SolveContext context)
    {
        var states = new (WideBlock Row, WideBlock Totals)[times.Length];
        var splits = new IReadOnlyList<int>[times.Length];
        for (var i = 0; i < times.Length; i++)
        {
            (splits[i], var rest) = steps.Split(times[i]);
            states[i] = (start, new WideBlock(1, totals.Columns));
            if (rest > 0)
            {
                var step = new ShortStep(steps.Chain, rest);
                if (totals.Columns > 0)
                {
                    states[i].Totals = WideProduct.Of(start, [mass], step.Totals(totals, context.Cancellation), null, false, context.Cancellation);
                }

                states[i].Row = step.Row(start, mass, context.Cancellation);
            }
        }

        var last = splits.Max(s => s.Count == 0 ? -1 : s[^1]);
        for (var j = 0; j <= last; j++)
        {
            var level = steps.At(j, context.Cancellation);
            context.Progress?.Report(new SolveProgress("squaring", j + 1, last + 1, ""));
            for (var i = 0; i < times.Length; i++)
            {
                if (!splits[i].Contains(j))
                {
                    continue;
                }

                if (totals.Columns > 0)
                {
                    var more = WideProduct.Of(states[i].Row, [mass], level.Totals, null, false, context.Cancellation);
                    TransitionLadder.AddTo(more, states[i].Totals);
                    states[i].Totals = more;
                }

                states[i].Row = WideProduct.Of(states[i].Row, [mass], level.Matrix, null, true, context.Cancellation);
            }
        }

        return states;
    }

    private TimeAnswer Read(ReachedChain chain, (WideBlock Row, WideBlock Totals) state, SolveContext context)
    {
        var (row, earned) = state;
        var values = WideProduct.Of(row, [mass], rates, null, false, context.Cancellation);
        Estimate Value(WideBlock block, int c, double[] reward) =>
            Array.Exists(chain.States, i => reward[i] > 0) ? Estimated(block.Rounded(0, c)) : Estimate.Zero;
        var answer = new TimeAnswer(
            [.. problem.Rates.Select((r, c) => Value(values, c, r))],
            [.. problem.Totals.Select((r, c) => Value(earned, c, r))],
            problem.WantsDistributions ? new double[problem.Start.Length] : null,
            problem.WantsDistributions ? new double[problem.Start.Length] : null);
        for (var k = 0; problem.WantsDistributions && k < chain.States.Length; k++)
        {
            (answer.Distribution![chain.States[k]], answer.Bounds![chain.States[k]]) = row.Rounded(0, k);
        }

        return answer;
    }

    private static Estimate Estimated((double Value, double Bound) rounded) => new(rounded.Value, rounded.Bound, true);
}
