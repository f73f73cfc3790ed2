using ChainSolve.Expressions;

namespace ChainSolve.Binding;

/// <summary>
/// Works out at which share of its rate each move is served by its crew, as an expression over the state.
/// </summary>
/// <remarks>
/// A job is a replica in a state out of which an enabled move of a rate above 0 goes by the crew: one job, however many
/// such moves. With D jobs and c members each job is served at min(1, c/D). In a ranked crew the jobs of the lower
/// numbers take their members first; those of one rank share what is left. Where moves of several ranks leave one
/// state, the job counts at the most urgent of those that are enabled, and all of its moves are served at that rank's
/// share: one replica keeps the crew busy once, at its most urgent need.
/// </remarks>
internal sealed class CrewShares
{
    private readonly NumberExpr size;
    private readonly Dictionary<(ItemSymbol Item, int From), JobState> jobStates;
    private readonly Dictionary<double, NumberExpr> shareOfRank = [];
    private readonly bool isEnough;

    /// <param name="crew">The crew, its count bound.</param>
    /// <param name="moves">All moves by this crew.</param>
    public CrewShares(CrewSymbol crew, IReadOnlyList<MoveDraft> moves)
    {
        size = crew.Count!.Expr;
        jobStates = moves.GroupBy(m => (m.Item, m.From)).ToDictionary(g => g.Key, g => new JobState([.. g]));
        isEnough = size is ConstantExpr { Value: var members } && MostJobs(moves) is { } most && most <= members;
        AddShares();
    }

    /// <summary>The share of its rate at which a move is served; null where it is always 1.</summary>
    public NumberExpr? ShareOf(MoveDraft move)
    {
        if (isEnough)
        {
            return null;
        }

        var state = jobStates[(move.Item, move.From)];
        return state.Ranks
            .Where(rank => rank < move.Rank)
            .Reverse()
            .Aggregate(shareOfRank[move.Rank], (share, rank) => ExprNodes.Choose(state.EnabledAt(rank), shareOfRank[rank], share));
    }

    private static double? MostJobs(IReadOnlyList<MoveDraft> moves)
    {
        var counts = moves.Select(m => m.Item).Distinct().Select(i => (i.Count?.Expr as ConstantExpr)?.Value).ToList();
        return counts.Contains(null) ? null : counts.Sum();
    }

    private void AddShares()
    {
        var before = new List<NumberExpr>();
        foreach (var rank in jobStates.Values.SelectMany(s => s.Ranks).Distinct().Order())
        {
            var jobs = Add([.. jobStates.Values.Select(s => s.JobsAt(rank)).OfType<NumberExpr>()]);
            var left = before.Count == 0
                ? size
                : ExprNodes.Function(BuiltInFunction.Max, [ExprNodes.Number(0), ExprNodes.Difference(size, Add(before))]);

            // Without a job nothing is served; the 1 only keeps 0/0 away.
            var each = ExprNodes.Quotient(left, ExprNodes.Function(BuiltInFunction.Max, [ExprNodes.Number(1), jobs]));
            shareOfRank[rank] = ExprNodes.Function(BuiltInFunction.Min, [ExprNodes.Number(1), each]);
            before.Add(jobs);
        }
    }

    private static NumberExpr Add(IReadOnlyList<NumberExpr> terms) => ExprNodes.Sum([.. terms.Select(t => new SumTerm(t, false))]);

    /// <summary>A state of an item whose replicas can be jobs, with its moves by the crew.</summary>
    private sealed class JobState
    {
        private readonly IReadOnlyList<MoveDraft> moves;
        private readonly SortedDictionary<double, ConditionExpr> enabled = [];

        public JobState(IReadOnlyList<MoveDraft> moves)
        {
            this.moves = moves;
            foreach (var rank in moves.GroupBy(m => m.Rank))
            {
                enabled[rank.Key] = ExprNodes.Any([.. rank.Select(Enabled)]);
            }
        }

        public IEnumerable<double> Ranks => enabled.Keys;

        public ConditionExpr EnabledAt(double rank) => enabled[rank];

        /// <summary>How many jobs of a rank are in this state; null where there can be none.</summary>
        public NumberExpr? JobsAt(double rank)
        {
            if (!enabled.TryGetValue(rank, out var atRank))
            {
                return null;
            }

            var moreUrgent = enabled.Where(e => e.Key < rank).Select(e => ExprNodes.Not(e.Value));
            var isJob = ExprNodes.All([atRank, .. moreUrgent]);
            return ExprNodes.Choose(isJob, moves[0].Source, ExprNodes.Number(0));
        }

        // What reads the state is asked only where a replica is there to move.
        private static ConditionExpr Enabled(MoveDraft move)
        {
            // A rate without a value is told of where the move itself is looked at.
            ConditionExpr runs = move.Rate.Expr is ConstantExpr rate
                ? new TruthExpr(rate.Value > 0)
                : new CompareExpr(Comparison.Greater, move.Rate.Expr, ExprNodes.Number(0)) { IsFalseIfUndefined = true };
            var guard = Transitions.GuardOf(move);
            return guard is null ? runs : ExprNodes.All([guard, runs]);
        }
    }
}
