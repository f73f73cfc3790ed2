namespace ChainSolve.StateSpace;

/// <summary>Reads what leads out of consecutive states. Holds buffers: belongs to one thread.</summary>
internal abstract class StateRows
{
    /// <summary>How many entries each of the states has.</summary>
    public abstract ReadOnlySpan<int> Counts { get; }

    /// <summary>The number of the state that each entry leads to, ascending for each state.</summary>
    public abstract ReadOnlySpan<int> Targets { get; }

    /// <summary>The rate of each entry.</summary>
    public abstract ReadOnlySpan<double> Rates { get; }

    /// <summary>Which transitions were possible in some state so far.</summary>
    public abstract bool[] Happens();

    /// <summary>Reads the rows of some states; false where one leads to a state that is not in the table.</summary>
    /// <exception cref="StateFaultException">Something that is enabled in a state is not possible.</exception>
    public abstract bool TryRead(int first, int count);
}
