using System.Numerics;
using ChainSolve.Modelling;

namespace ChainSolve.StateSpace;

/// <summary>One thread's part in exploring: it expands the states of its shard, sends successors to their owners, and takes those sent to it.</summary>
internal sealed class ExploreWorker<TKey>
    where TKey : unmanaged, IBinaryInteger<TKey>
{
    // So many are taken at once that their places in memory are waited for together.
    private const int KeysTakenAtOnce = 1024;

    private readonly KeySet<TKey> states;
    private readonly int shard;
    private readonly SuccessorRow<TKey> row;
    private readonly KeyList<TKey>[] sent;
    private KeyList<TKey> level = new();
    private KeyList<TKey> next = new();
    private int at;

    public ExploreWorker(SuccessorKeys<TKey> keys, GivenValues givens, KeySet<TKey> states, int shard, CancellationToken cancellation)
    {
        (this.states, this.shard) = (states, shard);
        row = new SuccessorRow<TKey>(keys, givens, cancellation);
        sent = [.. Enumerable.Range(0, states.Shards).Select(_ => new KeyList<TKey>())];
    }

    /// <summary>How many states of its shard were found.</summary>
    public long Found { get; private set; }

    /// <summary>How many states it has expanded.</summary>
    public long LookedAt { get; private set; }

    /// <summary>How many transitions they have.</summary>
    public long Transitions { get; private set; }

    /// <summary>How many states of its level are not expanded yet.</summary>
    public int Left => level.Count - at;

    /// <summary>The state with the smallest key of those with a fault; null while there is none.</summary>
    public (TKey Key, StateFaultException Fault)? Fault { get; private set; }

    /// <summary>About how many bytes it takes.</summary>
    public long Bytes => (level.Capacity + next.Capacity + sent.Sum(s => s.Capacity)) * (typeof(TKey) == typeof(ulong) ? 8 : 16);

    /// <summary>Takes a state of its shard in which the model starts.</summary>
    public void Start(TKey key) => Take([key]);

    /// <summary>Goes on to the states that were found by expanding the last level; how many they are.</summary>
    public int NextLevel()
    {
        (level, next) = (next, level);
        next.Clear();
        at = 0;
        return level.Count;
    }

    /// <summary>Expands some states, and stops early where it has found more than a number of them.</summary>
    public void Expand(int most, long room)
    {
        for (var end = at + Math.Min(most, Left); at < end && Found <= room;)
        {
            var key = level[at++];
            LookedAt++;
            try
            {
                row.Find(key);
            }
            catch (StateFaultException fault)
            {
                if (Fault is null || key < Fault.Value.Key)
                {
                    Fault = (key, fault);
                }

                continue;
            }

            Transitions += row.Count;
            Send(row.Keys);
            if (sent.Length == 1 && (sent[0].Count >= KeysTakenAtOnce || Found + sent[0].Count > room))
            {
                Collect([this]);
            }
        }
    }

    /// <summary>Takes what all workers sent to it.</summary>
    public void Collect(ReadOnlySpan<ExploreWorker<TKey>> workers)
    {
        foreach (var worker in workers)
        {
            Take(worker.sent[shard].Keys);
            worker.sent[shard].Clear();
        }
    }

    private void Send(ReadOnlySpan<TKey> keys)
    {
        if (sent.Length == 1)
        {
            sent[0].Add(keys);
            return;
        }

        foreach (var list in sent)
        {
            list.Room(keys.Length);
        }

        foreach (var key in keys)
        {
            sent[states.ShardOf(key)].AddToRoom(key);
        }
    }

    private void Take(ReadOnlySpan<TKey> keys)
    {
        var added = states.Add(shard, keys, next.Room(keys.Length));
        next.Take(added);
        Found += added;
    }
}
