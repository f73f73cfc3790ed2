namespace ChainSolve.Cli.Terminal;

/// <summary>Reads the bytes of a model from a file or from standard input.</summary>
internal static class ModelFile
{
    /// <summary>The name that stands for standard input.</summary>
    public const string StandardInput = "-";

    /// <summary>One byte more than this is read at most, so that the reader of models can say that a text is too long.</summary>
    private const int Limit = 8 * 1024 * 1024;

    /// <summary>The name of the model in messages.</summary>
    public static string NameOf(string path) => path == StandardInput ? "standard input" : path;

    /// <summary>Reads a model.</summary>
    /// <exception cref="FileProblemException">It could not be read.</exception>
    public static Task<byte[]> ReadAsync(string path, ProcessStreams streams, CancellationToken cancellation) =>
        // A file that has a length is there at once; a read that waits for a pipe or a terminal cannot be cancelled, but it can be left behind.
        path != StandardInput && File.Exists(path) && new FileInfo(path).Length > 0
            ? Task.FromResult(Read(path, streams))
            : Task.Run(() => Read(path, streams), cancellation).WaitAsync(cancellation);

    private static byte[] Read(string path, ProcessStreams streams)
    {
        try
        {
            using var stream = path == StandardInput ? streams.Input() : File.OpenRead(path);
            using var content = new MemoryStream();
            var buffer = new byte[1 << 16];
            int count;
            while (content.Length <= Limit && (count = stream.Read(buffer)) > 0)
            {
                content.Write(buffer, 0, count);
            }

            return content.ToArray();
        }
        catch (Exception exception) when (FileProblemException.IsFileTrouble(exception))
        {
            throw new FileProblemException(Describe(path, exception), exception);
        }
    }

    private static string Describe(string path, Exception exception)
    {
        if (Directory.Exists(path))
        {
            return $"'{path}' is a folder; name a model file";
        }

        return exception is FileNotFoundException or DirectoryNotFoundException
            ? $"there is no file '{path}'{NearestFile(path)}"
            : $"'{NameOf(path)}' could not be read: {exception.Message}";
    }

    private static string NearestFile(string path)
    {
        try
        {
            var folder = Path.GetDirectoryName(Path.GetFullPath(path));
            if (folder is null || !Directory.Exists(folder))
            {
                return "";
            }

            var names = Directory.EnumerateFiles(folder, "*.chain").Take(1000).Select(f => Path.GetFileName(f)!);
            return Commands.Hints.Nearest(Path.GetFileName(path), names);
        }
        catch (Exception exception) when (FileProblemException.IsFileTrouble(exception))
        {
            return "";
        }
    }
}
