namespace ChainSolve.Tests.Shared.Files;

/// <summary>Finds the files of the repository that tests read.</summary>
internal static class Repository
{
    public static string Root { get; } = FindRoot();

    public static string PathOf(params string[] parts) => Path.Combine([Root, .. parts]);

    public static string Read(params string[] parts) => File.ReadAllText(PathOf(parts)).ReplaceLineEndings("\n");

    private static string FindRoot()
    {
        var folder = AppContext.BaseDirectory;
        while (!File.Exists(Path.Combine(folder, "ChainSolve.sln")))
        {
            folder = Path.GetDirectoryName(folder) ?? throw new InvalidOperationException("The repository was not found above the tests.");
        }

        return folder;
    }
}
