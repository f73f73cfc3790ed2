namespace ChainSolve.StateSpace;

/// <summary>
/// The successors of one state with the rates to them: each a marking, or a shift of the key that is fixed for the
/// transition. Reused from state to state; belongs to one thread.
/// </summary>
internal sealed class SuccessorList(int variables)
{
    private int[] markings = new int[16 * Math.Max(1, variables)];
    private double[] rates = new double[16];
    private int[] transitions = new int[16];
    private bool[] shifts = new bool[16];

    public int Count { get; private set; }

    /// <summary>Whether the successor's key is that of the state, shifted by what its transition always shifts it.</summary>
    public bool IsShift(int successor) => shifts[successor];

    /// <summary>The marking of a successor that is not a shift.</summary>
    public ReadOnlySpan<int> Marking(int successor) => markings.AsSpan(successor * variables, variables);

    public double Rate(int successor) => rates[successor];

    /// <summary>The number of the transition that leads there.</summary>
    public int Transition(int successor) => transitions[successor];

    public void Clear() => Count = 0;

    public void Add(ReadOnlySpan<int> marking, double rate, int transition)
    {
        AddEntry(rate, transition, isShift: false);
        marking.CopyTo(markings.AsSpan((Count - 1) * variables));
    }

    public void AddShift(double rate, int transition) => AddEntry(rate, transition, isShift: true);

    private void AddEntry(double rate, int transition, bool isShift)
    {
        if (Count == rates.Length)
        {
            Array.Resize(ref markings, 2 * markings.Length);
            Array.Resize(ref rates, 2 * rates.Length);
            Array.Resize(ref transitions, 2 * transitions.Length);
            Array.Resize(ref shifts, 2 * shifts.Length);
        }

        rates[Count] = rate;
        transitions[Count] = transition;
        shifts[Count++] = isShift;
    }
}
