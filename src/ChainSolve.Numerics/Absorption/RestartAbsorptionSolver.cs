using ChainSolve.Numerics.Arithmetic;
using ChainSolve.Numerics.Iteration;
using ChainSolve.Numerics.Multilevel;
using ChainSolve.Numerics.Operators;
using ChainSolve.Numerics.Stationary;
using ChainSolve.Numerics.Structure;

namespace ChainSolve.Numerics.Absorption;

/// <summary>
/// An iteration for sets of states that are too large to be eliminated. Sojourn times are stationary weights of
/// the chain that starts again where it ends; earnings are sojourn times of the chain run backwards in time.
/// </summary>
/// <remarks>
/// Backwards: with sojourn times x, the chain with rates x_i q_ij / x_j from j to i has, from the start x r, the
/// sojourn times x m, where m are the earnings from r. The bound is estimated.
/// </remarks>
/// <param name="iteration">The method for stationary weights; its name is that of this one too.</param>
/// <param name="costPerEntry">About how many operations it takes for a transition.</param>
internal sealed class RestartAbsorptionSolver(IStationarySolver iteration, double costPerEntry) : IAbsorptionSolver
{
    public string Name => iteration.Name;

    /// <summary>Whether the weights come from aggregation.</summary>
    public bool IsMultilevel => iteration is MultilevelSolver;

    /// <summary>The same, but sweeps that turn out slow are left early.</summary>
    public RestartAbsorptionSolver LeftEarly() =>
        iteration is SweepSolver sweeps ? new RestartAbsorptionSolver(sweeps.LeftEarly(), costPerEntry) : this;

    public double Cost(AbsorptionProblem problem) =>
        costPerEntry * (problem.Generator.TransitionCount + problem.Generator.StateCount) * (1 + problem.Starts.Count + problem.Rewards.Count);

    public AbsorptionResult Solve(AbsorptionProblem problem, SolveContext context)
    {
        CheckLeft(problem);
        var chain = AliveChain.Of(problem);
        var count = problem.Generator.StateCount;
        var run = new Run(chain, iteration, context);
        return new AbsorptionResult
        {
            Sojourns = [.. problem.Starts.Select(s => chain.Restriction.Spread(run.Sojourns(chain.Restriction.Take(s)), count))],
            Earnings = [.. problem.Rewards.Select(r => chain.Restriction.Spread(run.Earnings(chain.Restriction.Take(r)), count))],
            RelativeBound = run.Bound,
            IsProved = false,
            How = run.How,
        };
    }

    private static void CheckLeft(AbsorptionProblem problem)
    {
        bool[] ended = [.. problem.Alive.Select(a => !a)];
        var leaves = Reachability.To(problem.Generator, ended);
        if (Array.IndexOf(leaves, false) is var stuck and >= 0)
        {
            throw new ArgumentException(
                $"State {stuck}, or a group of states around it, is never left. Take closed classes apart before solving.", nameof(problem));
        }
    }

    /// <summary>One call of the solver; keeps the weights that several right sides share.</summary>
    private sealed class Run(AliveChain chain, IStationarySolver iteration, SolveContext context)
    {
        private readonly SparseRows rows = chain.Restriction.Generator.Rows;
        private readonly double[] toEnd = Array.ConvertAll(chain.ToEnd, e => e.ToDouble());
        private (double[] Weights, double[] Start, double Bound)? full;

        public double Bound { get; private set; }

        public string How { get; private set; } = "no state counts";

        public double[] Sojourns(double[] start)
        {
            var total = LongSum.Of(start);
            if (total == 0 || start.Length == 0)
            {
                return new double[start.Length];
            }

            var shares = Array.ConvertAll(start, p => p / total);
            var (x, bound) = Restarted(rows, toEnd, shares);
            if (full is null && Array.TrueForAll(x, s => s > 0 && double.IsFinite(s)))
            {
                full = (x, shares, bound);
            }

            Bound = Math.Max(Bound, bound);
            return Array.ConvertAll(x, s => s * total);
        }

        public double[] Earnings(double[] rewards)
        {
            if (rewards.Length == 0 || Array.TrueForAll(rewards, r => r == 0))
            {
                return new double[rewards.Length];
            }

            if (full is null)
            {
                // Nothing yet has time in every state; a start everywhere does.
                var even = new double[rewards.Length];
                Array.Fill(even, 1.0 / even.Length);
                var (weights, weightBound) = Restarted(rows, toEnd, even);
                full = (weights, even, weightBound);
            }

            var (x, start, xBound) = full.Value;
            var reversed = Reversed(x);
            var backToEnd = new double[x.Length];
            var flow = new double[x.Length];
            for (var j = 0; j < x.Length; j++)
            {
                backToEnd[j] = start[j] / x[j];
                flow[j] = x[j] * rewards[j];
            }

            var total = LongSum.Of(flow);
            var (u, uBound) = Restarted(reversed, backToEnd, Array.ConvertAll(flow, f => f / total));
            var m = new double[x.Length];
            for (var i = 0; i < m.Length; i++)
            {
                m[i] = u[i] / x[i] * total;
            }

            // The weights' own error has moved the backward rates; it enters once through them and once when dividing.
            Bound = Math.Max(Bound, (3 * xBound) + uBound + Imbalance(m, rewards));
            return m;
        }

        /// <summary>The sojourn times of a chain from start shares, over the states that the start reaches.</summary>
        private (double[] Times, double Bound) Restarted(SparseRows between, double[] end, double[] start)
        {
            var fastest = chain.Restriction.Generator.MaxExitRate;
            var whole = RestartedChain.Of(between, end, start, fastest > 0 ? fastest : end.Max());
            var last = between.Count;
            bool[] from = new bool[last + 1];
            from[last] = true;
            var reached = Reachability.From(whole, from);
            var part = Restriction.Of(whole, [.. Enumerable.Range(0, last + 1).Where(i => reached[i])]);
            var vector = iteration.Solve(part.Generator, context);
            var perCycle = vector.Probabilities[^1] * whole.ExitRates[last];
            var times = part.Spread(vector.Probabilities, last + 1)[..last];
            How = vector.How + ", on the chain that starts again at its end";
            return (Array.ConvertAll(times, p => p / perCycle), (2 * vector.RelativeBound) + 4e-16);
        }

        private SparseRows Reversed(double[] x)
        {
            var columns = chain.Restriction.Generator.Columns;
            var values = new double[columns.EntryCount];
            for (var j = 0; j < x.Length; j++)
            {
                for (var e = columns.Offsets[j]; e < columns.Offsets[j + 1]; e++)
                {
                    values[e] = columns.Values[e] * (x[columns.Targets[e]] / x[j]);
                }
            }

            return new SparseRows(x.Length, columns.Offsets, columns.Targets, values);
        }

        /// <summary>How far the earnings miss their own equations, relative, state by state.</summary>
        private double Imbalance(double[] m, double[] rewards)
        {
            var worst = 0.0;
            for (var i = 0; i < m.Length; i++)
            {
                var (sum, rate) = (rewards[i], toEnd[i]);
                for (var e = rows.Offsets[i]; e < rows.Offsets[i + 1]; e++)
                {
                    sum += rows.Values[e] * m[rows.Targets[e]];
                    rate += rows.Values[e];
                }

                if (m[i] > 0)
                {
                    worst = Math.Max(worst, Math.Abs((sum / rate / m[i]) - 1));
                }
            }

            return worst;
        }
    }
}
