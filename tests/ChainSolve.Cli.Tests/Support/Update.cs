namespace ChainSolve.Cli.Tests.Support;

/// <summary>Whether tests rewrite expected output in place of comparing it.</summary>
internal static class Update
{
    public static bool IsWanted => Environment.GetEnvironmentVariable("CHAINSOLVE_UPDATE") == "1";
}
