using ChainSolve.Cli.Terminal;
using ChainSolve.Cli.Tests.Support;

namespace ChainSolve.Cli.Tests.Terminal;

public sealed class AtomicFileTests : IDisposable
{
    private readonly TemporaryFolder folder = new();

    [Fact]
    public void Write_NewFile_HoldsTheText()
    {
        AtomicFile.Write(folder.File("a.txt"), writer => writer.Write("größer"));

        Assert.Equal("größer"u8.ToArray(), File.ReadAllBytes(folder.File("a.txt")));
    }

    [Fact]
    public void Write_ExistingFile_IsReplacedAndKeepsItsMode()
    {
        var path = folder.Write("a.txt", "old and longer");
        if (!OperatingSystem.IsWindows())
        {
            File.SetUnixFileMode(path, UnixFileMode.UserRead | UnixFileMode.UserWrite | UnixFileMode.GroupRead);
        }

        AtomicFile.Write(path, writer => writer.Write("new"));

        Assert.Equal("new", File.ReadAllText(path));
        if (!OperatingSystem.IsWindows())
        {
            Assert.Equal(UnixFileMode.UserRead | UnixFileMode.UserWrite | UnixFileMode.GroupRead, File.GetUnixFileMode(path));
        }
    }

    [Fact]
    public void Write_FailsHalfWay_LeavesTheOldFileAndNothingElse()
    {
        var path = folder.Write("a.txt", "old");

        Assert.Throws<FileProblemException>(() => AtomicFile.Write(path, writer =>
        {
            writer.Write("half");
            throw new IOException("the disk is full");
        }));

        Assert.Equal("old", File.ReadAllText(path));
        Assert.Equal([path], Directory.GetFiles(folder.Path));
    }

    [Fact]
    public void Write_Cancelled_LeavesNothing()
    {
        Assert.Throws<OperationCanceledException>(() =>
            AtomicFile.Write(folder.File("a.txt"), _ => throw new OperationCanceledException()));

        Assert.Empty(Directory.GetFiles(folder.Path));
    }

    [Fact]
    public void Write_Link_KeepsTheLink()
    {
        var path = folder.Write("a.txt", "old");
        File.CreateSymbolicLink(folder.File("link"), path);

        AtomicFile.Write(folder.File("link"), writer => writer.Write("new"));

        Assert.Equal("new", File.ReadAllText(path));
        Assert.NotNull(File.ResolveLinkTarget(folder.File("link"), returnFinalTarget: false));
    }

    [Fact]
    public void Write_Folder_SaysSo()
    {
        var exception = Assert.Throws<FileProblemException>(() => AtomicFile.Write(folder.Path, writer => writer.Write("x")));

        Assert.Equal($"'{folder.Path}' is a folder; name a file", exception.Message);
    }

    [Fact]
    public void Write_MissingFolder_NamesIt()
    {
        var path = Path.Combine(folder.Path, "missing", "a.txt");

        var exception = Assert.Throws<FileProblemException>(() => AtomicFile.Write(path, writer => writer.Write("x")));

        Assert.Equal($"'{path}' cannot be written: there is no folder '{Path.Combine(folder.Path, "missing")}'", exception.Message);
    }

    public void Dispose() => folder.Dispose();
}
