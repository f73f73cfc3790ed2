namespace ChainSolve.Numerics.Multilevel;

/// <summary>Puts the states of a level into groups, each state with those from which most of its inflow comes.</summary>
internal sealed class FlowGroups
{
    private const int Size = 4;

    // A state that finds all its strong neighbours taken may still join one of their groups, up to this size.
    private const int LargestSize = 6;

    // An inflow counts as strong from this share of the largest on.
    private const double StrongShare = 0.25;

    private readonly FlowLevel level;
    private readonly int[] groupOf;
    private readonly List<byte> sizes = [];
    private readonly Dictionary<int, int> waiting = [];
    private readonly int[] members = new int[Size];

    private FlowGroups(FlowLevel level)
    {
        this.level = level;
        groupOf = new int[level.Count];
        Array.Fill(groupOf, -1);
    }

    /// <summary>The group of each state, numbered by their first states, and how many groups there are.</summary>
    public static (int[] GroupOf, int Count) Of(FlowLevel level, CancellationToken cancellation)
    {
        var groups = new FlowGroups(level);
        for (var i = 0; i < level.Count; i++)
        {
            if ((i & 65535) == 0)
            {
                cancellation.ThrowIfCancellationRequested();
            }

            if (groups.groupOf[i] < 0)
            {
                groups.Start(i);
            }
        }

        return (groups.groupOf, groups.sizes.Count);
    }

    private void Start(int seed)
    {
        var (strongest, _) = Strongest(seed);
        if (strongest >= 0 && groupOf[strongest] >= 0 && FreeNeighbour(seed) < 0)
        {
            Join(seed, strongest);
            return;
        }

        var group = sizes.Count;
        sizes.Add(1);
        Put(seed, group, 0);
        for (var size = 1; size < Size; size++)
        {
            var next = BestFree(size);
            if (next < 0)
            {
                break;
            }

            sizes[group]++;
            Put(next, group, size);
        }
    }

    private void Put(int state, int group, int place)
    {
        groupOf[state] = group;
        members[place] = state;
    }

    /// <summary>The group of the neighbour, or where that is full one of states that wait for the same neighbour.</summary>
    private void Join(int seed, int strongest)
    {
        var group = groupOf[strongest];
        if (sizes[group] >= LargestSize && (!waiting.TryGetValue(strongest, out group) || sizes[group] >= Size))
        {
            group = sizes.Count;
            sizes.Add(0);
            waiting[strongest] = group;
        }

        groupOf[seed] = group;
        sizes[group]++;
    }

    private double Flow(int e) => level.Inflows.Values[e] * level.Weights[level.Inflows.Targets[e]];

    private (int Source, double Flow) Strongest(int state)
    {
        var (source, most) = (-1, 0.0);
        for (var e = (int)level.Inflows.Offsets[state]; e < level.Inflows.Offsets[state + 1]; e++)
        {
            if (Flow(e) > most)
            {
                (source, most) = (level.Inflows.Targets[e], Flow(e));
            }
        }

        return (source, most);
    }

    private int FreeNeighbour(int state) => BestFreeOf(state).Source;

    private (int Source, double Share) BestFreeOf(int state)
    {
        var least = Strongest(state).Flow;
        var (source, most) = (-1, least * StrongShare);
        for (var e = (int)level.Inflows.Offsets[state]; e < level.Inflows.Offsets[state + 1]; e++)
        {
            var from = level.Inflows.Targets[e];
            if (groupOf[from] < 0 && Flow(e) > most && from != state)
            {
                (source, most) = (from, Flow(e));
            }
        }

        return (source, source < 0 ? 0 : most);
    }

    private int BestFree(int size)
    {
        var (best, most) = (-1, 0.0);
        for (var m = 0; m < size; m++)
        {
            var (source, flow) = BestFreeOf(members[m]);
            if (flow > most)
            {
                (best, most) = (source, flow);
            }
        }

        return best;
    }
}
