namespace ChainSolve.Cli.Commands;

/// <summary>What a command on a model found.</summary>
/// <param name="ExitCode">The exit code.</param>
/// <param name="Write">Writes the answer, whole; called once.</param>
/// <param name="Complaint">One line for the error stream where the exit code is not 0; otherwise null.</param>
internal sealed record CommandAnswer(int ExitCode, Action<TextWriter> Write, string? Complaint = null);
