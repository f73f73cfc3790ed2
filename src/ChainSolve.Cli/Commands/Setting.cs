namespace ChainSolve.Cli.Commands;

/// <summary>A value that an option gives to a given.</summary>
internal sealed record Setting(string Name, string Value);
