namespace ChainSolve.Cli.Terminal;

/// <summary>Where the answer goes: standard output or a file.</summary>
internal sealed class AnswerSink(ProcessStreams streams, string? path)
{
    private readonly bool isFile = path is not null && path != "-";

    /// <summary>Looks, before the work is done, whether the file can stand at its place.</summary>
    /// <exception cref="FileProblemException">It cannot.</exception>
    public void Check()
    {
        if (isFile)
        {
            AtomicFile.Check(path!);
        }
    }

    /// <summary>Writes the answer.</summary>
    /// <exception cref="FileProblemException">It could not be written.</exception>
    public void Write(Action<TextWriter> write)
    {
        if (isFile)
        {
            AtomicFile.Write(path!, write);
            return;
        }

        try
        {
            write(streams.Answer);
            streams.Answer.Flush();
        }
        catch (IOException exception)
        {
            throw new FileProblemException($"standard output could not be written: {exception.Message}", exception);
        }
    }
}
