using ChainSolve.Numerics.Operators;

namespace ChainSolve.Numerics.Multilevel;

/// <summary>The way from a level to a coarser one and back.</summary>
internal sealed class Coarsening
{
    private readonly FlowLevel fine;
    private readonly int[] groupOf;

    // For each inflow of the fine level the one of the coarse level to which it belongs; -1 inside a group.
    private readonly int[] entryOf;

    private Coarsening(FlowLevel fine, int[] groupOf, int[] entryOf, FlowLevel coarse)
    {
        (this.fine, this.groupOf, this.entryOf, Coarse) = (fine, groupOf, entryOf, coarse);
    }

    public FlowLevel Coarse { get; }

    public static Coarsening Of(FlowLevel fine, int[] groupOf, int count, CancellationToken cancellation)
    {
        var (offsets, sources) = (fine.Inflows.Offsets, fine.Inflows.Targets);
        var (starts, members) = Members(groupOf, count);
        var entryOf = new int[fine.Inflows.EntryCount];
        var coarseOffsets = new long[count + 1];
        var coarseSources = new List<int>(entryOf.Length / 3);
        var place = new int[count];
        Array.Fill(place, -1);
        for (var group = 0; group < count; group++)
        {
            if ((group & 16383) == 0)
            {
                cancellation.ThrowIfCancellationRequested();
            }

            var begin = coarseSources.Count;
            place[group] = -2;
            for (var m = starts[group]; m < starts[group + 1]; m++)
            {
                var state = members[m];
                for (var e = (int)offsets[state]; e < offsets[state + 1]; e++)
                {
                    var from = groupOf[sources[e]];
                    if (from == group)
                    {
                        entryOf[e] = -1;
                        continue;
                    }

                    if (place[from] < begin)
                    {
                        place[from] = coarseSources.Count;
                        coarseSources.Add(from);
                    }

                    entryOf[e] = place[from];
                }
            }

            coarseOffsets[group + 1] = coarseSources.Count;
        }

        var inflows = new SparseRows(count, coarseOffsets, [.. coarseSources], new double[coarseSources.Count]);
        return new Coarsening(fine, groupOf, entryOf, new FlowLevel(inflows, new double[count], new double[count]));
    }

    /// <summary>Adds up the flows between the groups at the weights of the fine level; the coarse weights begin at 1.</summary>
    public void Restrict(CancellationToken cancellation)
    {
        var (sources, rates, x) = (fine.Inflows.Targets, fine.Inflows.Values, fine.Weights);
        var flows = Coarse.Inflows.Values;
        Array.Clear(flows);
        for (var e = 0; e < entryOf.Length; e++)
        {
            if ((e & 0xfffff) == 0)
            {
                cancellation.ThrowIfCancellationRequested();
            }

            if (entryOf[e] >= 0)
            {
                flows[entryOf[e]] += rates[e] * x[sources[e]];
            }
        }

        Array.Clear(Coarse.Outflows);
        var coarseSources = Coarse.Inflows.Targets;
        for (var e = 0; e < flows.Length; e++)
        {
            Coarse.Outflows[coarseSources[e]] += flows[e];
        }

        Array.Fill(Coarse.Weights, 1);
    }

    /// <summary>Lets every state grow as its group does.</summary>
    public void Correct() => Spread(Coarse.Weights, fine.Weights);

    /// <summary>Multiplies each entry of a vector over the fine level by that of its group.</summary>
    public void Spread(double[] ofGroups, double[] ofStates)
    {
        for (var i = 0; i < ofStates.Length; i++)
        {
            ofStates[i] *= ofGroups[groupOf[i]];
        }
    }

    private static (int[] Starts, int[] Members) Members(int[] groupOf, int count)
    {
        var starts = new int[count + 1];
        foreach (var group in groupOf)
        {
            starts[group + 1]++;
        }

        for (var group = 0; group < count; group++)
        {
            starts[group + 1] += starts[group];
        }

        var next = starts[..count];
        var members = new int[groupOf.Length];
        for (var i = 0; i < groupOf.Length; i++)
        {
            members[next[groupOf[i]]++] = i;
        }

        return (starts, members);
    }
}
