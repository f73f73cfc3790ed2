namespace ChainSolve.Cli.Tests.Support;

/// <summary>A folder that goes away with the test.</summary>
internal sealed class TemporaryFolder : IDisposable
{
    public TemporaryFolder()
    {
        Path = Directory.CreateTempSubdirectory("chainsolve-").FullName;
    }

    public string Path { get; }

    public string File(string name) => System.IO.Path.Combine(Path, name);

    public string Write(string name, string content)
    {
        System.IO.File.WriteAllText(File(name), content);
        return File(name);
    }

    public void Dispose() => Directory.Delete(Path, recursive: true);
}
