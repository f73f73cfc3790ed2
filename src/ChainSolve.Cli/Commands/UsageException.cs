namespace ChainSolve.Cli.Commands;

/// <summary>The command was called in a way that it does not understand; the message says what it takes.</summary>
internal sealed class UsageException(string message) : Exception(message);
