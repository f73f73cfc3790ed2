using System.Globalization;
using System.Numerics;
using ChainSolve.Modelling;
using ChainSolve.Numerics.Iteration;

namespace ChainSolve.StateSpace;

/// <summary>Finds all states that a model can reach, level by level from its start. Belongs to one thread.</summary>
internal sealed class Explorer<TKey>(BoundModel model, StateLayout layout, SuccessorFinder finder)
    where TKey : unmanaged, IBinaryInteger<TKey>
{
    private const int StatesBetweenLooks = 4096;

    private readonly KeyTable<TKey> table = new();
    private readonly SuccessorKeys<TKey> keys = new(new KeyCodec<TKey>(layout), finder.Plans);

    /// <summary>The reachable states, numbered by their keys.</summary>
    /// <exception cref="LimitExceededException">There are more than the limit.</exception>
    /// <exception cref="ModelFaultsException">A state shows a fault: of those nearest to the start, the one with the smallest key is told.</exception>
    public StateTable Explore(IReadOnlyList<(int[] Marking, double Probability)> starts, long maxStates, SolveContext context)
    {
        foreach (var (marking, _) in starts)
        {
            table.Add(keys.Codec.Pack(marking));
        }

        var current = new int[model.Variables.Count];
        var levelEnd = table.Count;
        var transitions = 0L;
        (TKey Key, StateFaultException Fault)? first = null;
        for (var state = 0; state < table.Count; state++)
        {
            if (state == levelEnd)
            {
                ThrowIfAny(first, starts);
                levelEnd = table.Count;
            }

            if (state % StatesBetweenLooks == 0)
            {
                context.Cancellation.ThrowIfCancellationRequested();
                context.Progress?.Report(new SolveProgress("exploring", table.Count, 0, ""));
            }

            var key = table[state];
            keys.Codec.Unpack(key, current);
            try
            {
                finder.Find(current);
            }
            catch (StateFaultException fault)
            {
                if (first is null || key < first.Value.Key)
                {
                    first = (key, fault);
                }

                continue;
            }

            for (var s = 0; s < finder.Successors.Count; s++)
            {
                var next = keys.Of(key, finder.Successors, s);
                transitions += next == key ? 0 : 1;
                if (table.Add(next) && table.Count > maxStates)
                {
                    throw new LimitExceededException("states", string.Create(
                        CultureInfo.InvariantCulture,
                        $"the model has more than the {maxStates:N0} states allowed, {table.Count - state - 1:N0} of them not looked at yet; raise the limit (MaxStates, --max-states) or write alike things as one item with 'x N'"));
                }
            }
        }

        ThrowIfAny(first, starts);
        table.Sort();
        return new KeyedStates<TKey>(table, keys, transitions);
    }

    private void ThrowIfAny((TKey Key, StateFaultException Fault)? first, IReadOnlyList<(int[] Marking, double Probability)> starts)
    {
        if (first is { } found)
        {
            var marking = new int[model.Variables.Count];
            keys.Codec.Unpack(found.Key, marking);
            throw StateFaults.Tell(model, found.Fault, marking, new WayTo<TKey>(model, keys, finder).Find(starts, found.Key));
        }
    }
}
