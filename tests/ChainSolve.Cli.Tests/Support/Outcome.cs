namespace ChainSolve.Cli.Tests.Support;

/// <summary>What a command left behind.</summary>
internal sealed record Outcome(int ExitCode, string Answer, string Error);
