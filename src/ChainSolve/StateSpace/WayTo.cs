using System.Numerics;
using ChainSolve.Modelling;

namespace ChainSolve.StateSpace;

/// <summary>Finds a shortest way from the start to a state by exploring again, so that exploring itself need not remember ways.</summary>
internal sealed class WayTo<TKey>(SuccessorKeys<TKey> keys, SuccessorFinder finder)
    where TKey : unmanaged, IBinaryInteger<TKey>
{
    private const int StatesBetweenLooks = 4096;

    private readonly BoundModel model = keys.Plans.Model;

    /// <summary>The labels of the transitions on the way; empty for a state of the start.</summary>
    public IReadOnlyList<string> Find(IReadOnlyList<(int[] Marking, double Probability)> starts, TKey target, CancellationToken cancellation)
    {
        var table = new KeyTable<TKey>();
        var from = new List<(int State, int Transition)>();
        foreach (var (marking, _) in starts)
        {
            if (table.Add(keys.Codec.Pack(marking)))
            {
                from.Add((-1, -1));
            }
        }

        var current = new int[model.Variables.Count];
        for (var state = 0; state < table.Count; state++)
        {
            if (state % StatesBetweenLooks == 0)
            {
                cancellation.ThrowIfCancellationRequested();
            }

            if (table[state] == target)
            {
                return WayBack(from, state);
            }

            keys.Codec.Unpack(table[state], current);
            try
            {
                finder.Find(current);
            }
            catch (StateFaultException)
            {
                // No way leads on from a state with a fault.
                continue;
            }

            for (var s = 0; s < finder.Successors.Count; s++)
            {
                if (table.Add(keys.Of(table[state], finder.Successors, s)))
                {
                    from.Add((state, finder.Successors.Transition(s)));
                }
            }
        }

        throw new InvalidOperationException("A state that was reached before cannot be reached again.");
    }

    private List<string> WayBack(List<(int State, int Transition)> from, int state)
    {
        var way = new List<string>();
        for (; from[state].State >= 0; state = from[state].State)
        {
            way.Add(model.Transitions[from[state].Transition].Label);
        }

        way.Reverse();
        return way;
    }
}
