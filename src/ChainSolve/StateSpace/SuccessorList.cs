namespace ChainSolve.StateSpace;

/// <summary>The successors of one state: markings with the rates to them. Reused from state to state; belongs to one thread.</summary>
internal sealed class SuccessorList(int variables)
{
    private int[] markings = new int[16 * Math.Max(1, variables)];
    private double[] rates = new double[16];
    private int[] transitions = new int[16];

    public int Count { get; private set; }

    public ReadOnlySpan<int> Marking(int successor) => markings.AsSpan(successor * variables, variables);

    public double Rate(int successor) => rates[successor];

    /// <summary>The number of the transition that leads there.</summary>
    public int Transition(int successor) => transitions[successor];

    public void Clear() => Count = 0;

    public void Add(ReadOnlySpan<int> marking, double rate, int transition)
    {
        if (Count == rates.Length)
        {
            Array.Resize(ref markings, 2 * markings.Length);
            Array.Resize(ref rates, 2 * rates.Length);
            Array.Resize(ref transitions, 2 * transitions.Length);
        }

        marking.CopyTo(markings.AsSpan(Count * variables));
        rates[Count] = rate;
        transitions[Count++] = transition;
    }
}
