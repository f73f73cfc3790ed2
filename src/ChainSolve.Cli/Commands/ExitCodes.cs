namespace ChainSolve.Cli.Commands;

/// <summary>What the process returns to its caller.</summary>
internal static class ExitCodes
{
    public const int Done = 0;
    public const int InternalFault = 1;
    public const int Usage = 2;
    public const int ModelFaults = 3;
    public const int AccuracyNotReached = 4;
    public const int LimitHit = 5;
    public const int FileProblem = 6;

    /// <summary>128 and the number of SIGINT.</summary>
    public const int Interrupted = 130;

    /// <summary>128 and the number of SIGTERM.</summary>
    public const int Terminated = 143;
}
