using System.Globalization;
using System.Numerics;
using ChainSolve.Modelling;
using ChainSolve.Numerics.Iteration;

namespace ChainSolve.StateSpace;

/// <summary>
/// Finds all states that a model can reach, level by level from its start. Each thread has a worker, which owns the states of one shard; states
/// are expanded in rounds: workers find the successors of their states, then each takes those that it owns.
/// </summary>
internal sealed class Explorer<TKey>
    where TKey : unmanaged, IBinaryInteger<TKey>
{
    private const int StatesOfARound = 8192;

    // Each worker keeps a list for each other one.
    private const int MostThreads = 32;

    // Fewer states than this are sooner expanded than threads told of them.
    private const int FewStates = 512;

    private readonly SuccessorKeys<TKey> keys;
    private readonly GivenValues givens;
    private readonly SolveContext context;
    private readonly KeySet<TKey> states;
    private readonly ExploreWorker<TKey>[] workers;
    private readonly ExploreLimits limits;
    private readonly ExploreReport report;

    private Explorer(SuccessorKeys<TKey> keys, GivenValues givens, ExploreLimits limits, int threads, SolveContext context)
    {
        (this.keys, this.givens, this.context) = (keys, givens, context);
        this.limits = limits with { States = Math.Min(limits.States, Array.MaxLength) };
        states = KeySets.For<TKey>(keys.Plans.Layout, threads, context.Cancellation);
        workers = [.. Enumerable.Range(0, threads).Select(i => new ExploreWorker<TKey>(keys, givens, states, i, context.Cancellation))];
        report = new ExploreReport(context.Progress);
    }

    /// <summary>The reachable states, numbered by their keys.</summary>
    /// <param name="keys">What the transitions do.</param>
    /// <param name="givens">The values of the givens.</param>
    /// <param name="starts">Where the model starts.</param>
    /// <param name="limits">How much may be explored.</param>
    /// <param name="context">Threads, cancellation and progress.</param>
    /// <remarks>The result, the faults and the limits do not depend on the number of threads.</remarks>
    /// <exception cref="LimitExceededException">There are more than the limit.</exception>
    /// <exception cref="ModelFaultsException">A state shows a fault: of those nearest to the start, the one with the smallest key is told.</exception>
    public static StateTable Explore(
        SuccessorKeys<TKey> keys, GivenValues givens, IReadOnlyList<(int[] Marking, double Probability)> starts, ExploreLimits limits, SolveContext context)
    {
        // Where a compiled method does all and a map of bits takes the states, sending them costs more than finding them.
        var threads = keys.IsCompiled && KeySets.IsShort(keys.Plans.Layout) ? 1 : Math.Min(context.Threads, MostThreads);
        if (threads > 1)
        {
            try
            {
                return new Explorer<TKey>(keys, givens, limits, threads, context).Explore(starts);
            }
            catch (LimitExceededException)
            {
                // What was done by then depends on the threads: one thread does it again to tell the same as ever.
            }
        }

        return new Explorer<TKey>(keys, givens, limits, 1, context).Explore(starts);
    }

    private KeyedStates<TKey> Explore(IReadOnlyList<(int[] Marking, double Probability)> starts)
    {
        foreach (var (marking, _) in starts)
        {
            var key = keys.Codec.Pack(marking);
            workers[states.ShardOf(key)].Start(key);
        }

        for (var open = NextLevel(); open > 0; open = NextLevel())
        {
            while (workers.Any(w => w.Left > 0))
            {
                report.Tell(workers.Sum(w => w.Found), workers.Sum(w => w.LookedAt), Bytes);
                context.Cancellation.ThrowIfCancellationRequested();
                limits.CheckStates(workers.Sum(w => w.Found), Bytes);
                Round();
            }

            ThrowIfAny(starts);
        }

        states.Close(context.Cancellation);
        var found = new KeyedStates<TKey>(states, keys, checked((int)workers.Sum(w => w.Found)), workers.Sum(w => w.Transitions));
        limits.CheckTransitions(found.Count, found.TransitionCount, states.Bytes);
        return found;
    }

    private long Bytes => states.Bytes + workers.Sum(w => w.Bytes);

    private long NextLevel() => workers.Sum(w => (long)w.NextLevel());

    private void Round()
    {
        // A worker that is alone knows all states, and stops at the very one that is too many.
        var threads = workers.Sum(w => (long)w.Left) < FewStates ? 1 : workers.Length;
        var room = workers.Length == 1 ? limits.States : long.MaxValue;
        Workers.ForEach(workers, threads, w => w.Expand(StatesOfARound, room));
        Workers.ForEach(workers, threads, w => w.Collect(workers));
        if (workers.Sum(w => w.Found) > limits.States)
        {
            throw new LimitExceededException("states", string.Create(
                CultureInfo.InvariantCulture,
                $"the model has more than the {limits.States:N0} states allowed, {limits.States + 1 - workers.Sum(w => w.LookedAt):N0} of them not looked at yet; raise the limit (MaxStates, --max-states) or write alike things as one item with 'x N'"));
        }
    }

    private void ThrowIfAny(IReadOnlyList<(int[] Marking, double Probability)> starts)
    {
        var faults = workers.Select(w => w.Fault).OfType<(TKey Key, StateFaultException Fault)>().OrderBy(f => f.Key).ToList();
        if (faults is [var found, ..])
        {
            var marking = new int[keys.Plans.Model.Variables.Count];
            keys.Codec.Unpack(found.Key, marking);
            var finder = new SuccessorFinder(keys.Plans, givens, context.Cancellation);
            throw StateFaults.Tell(keys.Plans.Model, found.Fault, marking, new WayTo<TKey>(keys, finder).Find(starts, found.Key, context.Cancellation));
        }
    }
}
