namespace ChainSolve.Numerics.Iteration;

/// <summary>A solver could not give a value; the message has the figures.</summary>
public sealed class NotConvergedException : Exception
{
    /// <summary>Creates the exception.</summary>
    /// <param name="message">Which method failed, after how much work, and how far it was from its goal.</param>
    public NotConvergedException(string message)
        : base(message)
    {
    }
}
