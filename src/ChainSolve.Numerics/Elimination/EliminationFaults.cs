namespace ChainSolve.Numerics.Elimination;

/// <summary>Messages for chains that do not suit an elimination.</summary>
internal static class EliminationFaults
{
    /// <summary>A state with no way on is legal only where a chain without an end is down to its last state.</summary>
    public static void CheckLast(int state, bool isLast)
    {
        if (!isLast)
        {
            throw new ArgumentException(
                $"State {state}, or a group of states around it, is never left. Take closed classes apart before solving.");
        }
    }
}
