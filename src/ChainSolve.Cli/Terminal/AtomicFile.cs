using System.Text;

namespace ChainSolve.Cli.Terminal;

/// <summary>Writes files that are there whole or not at all.</summary>
internal static class AtomicFile
{
    /// <summary>Writes a text as UTF-8 beside its place and renames it when it is complete.</summary>
    /// <param name="path">The file; an existing one is replaced, a link keeps pointing where it points.</param>
    /// <param name="write">Writes the text.</param>
    /// <exception cref="FileProblemException">The file could not be written; nothing is left behind.</exception>
    public static void Write(string path, Action<TextWriter> write)
    {
        string? temporary = null;
        try
        {
            var target = Check(path);
            if (IsDevice(target))
            {
                WriteTo(target, FileMode.Open, write);
                return;
            }

            var folder = Path.GetDirectoryName(target)!;
            temporary = Path.Combine(folder, $".{Path.GetFileName(target)}.{Guid.NewGuid():N}.tmp");
            WriteTo(temporary, FileMode.CreateNew, write);
            CopyMode(target, temporary);
            File.Move(temporary, target, overwrite: true);
            temporary = null;
        }
        catch (Exception exception) when (FileProblemException.IsFileTrouble(exception))
        {
            throw new FileProblemException($"'{path}' could not be written: {exception.Message}", exception);
        }
        finally
        {
            if (temporary is not null)
            {
                TryDelete(temporary);
            }
        }
    }

    /// <summary>Looks, before the work is done, whether a file can stand at a place.</summary>
    /// <returns>The full path, links followed.</returns>
    /// <exception cref="FileProblemException">There is a folder at the place, or none to hold the file.</exception>
    public static string Check(string path)
    {
        var target = FinalTarget(path);
        if (Directory.Exists(target))
        {
            throw new FileProblemException($"'{path}' is a folder; name a file");
        }

        return Path.GetDirectoryName(target) is { } folder && Directory.Exists(folder)
            ? target
            : throw new FileProblemException($"'{path}' cannot be written: there is no folder '{Path.GetDirectoryName(target)}'");
    }

    private static string FinalTarget(string path)
    {
        var full = Path.GetFullPath(path);
        var link = new FileInfo(full);
        return link.LinkTarget is null ? full : link.ResolveLinkTarget(returnFinalTarget: true)?.FullName ?? full;
    }

    // Renaming a file over a device would replace the device.
    private static bool IsDevice(string path) =>
        !OperatingSystem.IsWindows() && path.StartsWith("/dev/", StringComparison.Ordinal) && File.Exists(path);

    private static void WriteTo(string path, FileMode mode, Action<TextWriter> write)
    {
        using var stream = new FileStream(path, mode, FileAccess.Write, FileShare.None);
        using var writer = new StreamWriter(stream, new UTF8Encoding(false));
        write(writer);
    }

    private static void CopyMode(string from, string to)
    {
        if (!OperatingSystem.IsWindows() && File.Exists(from))
        {
            File.SetUnixFileMode(to, File.GetUnixFileMode(from));
        }
    }

    private static void TryDelete(string path)
    {
        try
        {
            File.Delete(path);
        }
        catch (Exception exception) when (FileProblemException.IsFileTrouble(exception))
        {
            // The reason why the writing failed is the one that counts.
        }
    }
}
