namespace ChainSolve.Cli.Terminal;

/// <summary>A file could not be read or written; the message names it and the reason.</summary>
internal sealed class FileProblemException(string message, Exception? inner = null) : Exception(message, inner)
{
    /// <summary>Whether an exception is one of those that files throw.</summary>
    public static bool IsFileTrouble(Exception exception) =>
        exception is IOException or UnauthorizedAccessException or System.Security.SecurityException
            or NotSupportedException or ArgumentException;
}
