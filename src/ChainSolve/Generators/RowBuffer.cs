using ChainSolve.StateSpace;

namespace ChainSolve.Generators;

/// <summary>One row of a generator while it is put together. Reused from row to row; belongs to one thread.</summary>
internal sealed class RowBuffer(int transitions)
{
    private int[] targets = new int[16];
    private double[] rates = new double[16];

    /// <summary>How many entries the row has; those to one target are still apart.</summary>
    public int Count { get; private set; }

    /// <summary>Which transitions were possible in some state so far.</summary>
    public bool[] Happens { get; } = new bool[transitions];

    /// <summary>
    /// Takes the successors of a state, sorted by their numbers; those of one number stay in the order of the transitions. False where one
    /// is not among the states.
    /// </summary>
    public bool Read(StateTable states, SuccessorList successors, int state)
    {
        Count = 0;
        if (successors.Count > targets.Length)
        {
            (targets, rates) = (new int[2 * successors.Count], new double[2 * successors.Count]);
        }

        for (var s = 0; s < successors.Count; s++)
        {
            Happens[successors.Transition(s)] = true;
            var target = states.Find(state, successors, s);
            if (target < 0)
            {
                return false;
            }

            // A rate may underflow to 0 when it is shared out among drawn targets; the target stays reachable.
            if (target != state)
            {
                Insert(target, successors.Rate(s));
            }
        }

        return true;
    }

    /// <summary>Writes the row, rates to one target added in their order; the number of entries written.</summary>
    public int CopyTo(Span<int> rowTargets, Span<double> rowRates)
    {
        var count = 0;
        for (var k = 0; k < Count; k++)
        {
            if (count > 0 && rowTargets[count - 1] == targets[k])
            {
                rowRates[count - 1] += rates[k];
            }
            else
            {
                rowTargets[count] = targets[k];
                rowRates[count++] = rates[k];
            }
        }

        return count;
    }

    private void Insert(int target, double rate)
    {
        var at = Count++;
        for (; at > 0 && targets[at - 1] > target; at--)
        {
            targets[at] = targets[at - 1];
            rates[at] = rates[at - 1];
        }

        targets[at] = target;
        rates[at] = rate;
    }
}
