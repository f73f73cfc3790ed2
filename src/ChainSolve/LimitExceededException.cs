namespace ChainSolve;

/// <summary>A limit on states, memory or time was hit.</summary>
public sealed class LimitExceededException : Exception
{
    /// <summary>Creates the exception.</summary>
    /// <param name="limit">The name of the limit: <c>states</c>, <c>memory</c>, <c>time</c>.</param>
    /// <param name="message">What was needed, the limit, and how to raise it.</param>
    public LimitExceededException(string limit, string message)
        : base(message)
    {
        Limit = limit;
    }

    /// <summary>The name of the limit.</summary>
    public string Limit { get; }
}
