using System.Diagnostics;
using Xunit;

namespace PartCheck.Cli.Tests;

/// <summary>What <c>--out --replace</c> must never destroy: an input by another name, a link, a pipe or a device.</summary>
public sealed class OutputTargetTests : IDisposable
{
    private readonly string aside = Directory.CreateTempSubdirectory("partcheck-aside-").FullName;

    public void Dispose() => Directory.Delete(aside, recursive: true);

    [Fact]
    public async Task AnInputReachedThroughALinkedFolderIsNeverReplaced()
    {
        using BoardFolder board = new();
        string alias = Path.Combine(aside, "alias");
        Directory.CreateSymbolicLink(alias, board.Folder);
        Run run = await board.Check("--out", Path.Combine(alias, "parts.csv"), "--replace");
        Assert.Equal(73, run.Code);
        Assert.Contains("is an input of this run", run.Error, StringComparison.Ordinal);
        Assert.Equal(BoardFolder.Parts, await File.ReadAllTextAsync(board.At("parts.csv"), TestContext.Current.CancellationToken));

        // And the other way round: the board by its alias, the target by its own name.
        run = await Run.Of("check", alias, "--out", board.At("parts.csv"), "--replace");
        Assert.Equal(73, run.Code);
        Assert.Equal(BoardFolder.Parts, await File.ReadAllTextAsync(board.At("parts.csv"), TestContext.Current.CancellationToken));
    }

    [Fact]
    public async Task ALinkStaysALinkAndItsFileIsReplaced()
    {
        using BoardFolder board = new();
        string real = Path.Combine(aside, "real.txt");
        string link = Path.Combine(aside, "link.txt");
        await File.WriteAllTextAsync(real, "old", TestContext.Current.CancellationToken);
        File.CreateSymbolicLink(link, "real.txt");
        Assert.Equal(73, (await board.Check("--out", link)).Code);
        Assert.Equal(0, (await board.Check("--out", link, "--replace")).Code);
        Assert.Equal("real.txt", new FileInfo(link).LinkTarget);
        Assert.Contains("conforms", await File.ReadAllTextAsync(real, TestContext.Current.CancellationToken), StringComparison.OrdinalIgnoreCase);
        Assert.Equal(2, Directory.GetFileSystemEntries(aside).Length);
    }

    [Fact]
    public async Task LinksInACircleCannotBeCreated()
    {
        using BoardFolder board = new();
        File.CreateSymbolicLink(Path.Combine(aside, "a"), "b");
        File.CreateSymbolicLink(Path.Combine(aside, "b"), "a");
        Run run = await board.Check("--out", Path.Combine(aside, "a"), "--replace");
        Assert.Equal(73, run.Code);
        Assert.Empty(run.Output);
        Assert.Equal("b", new FileInfo(Path.Combine(aside, "a")).LinkTarget);
    }

    [Fact]
    public async Task APipeIsNotReplaced()
    {
        Assert.SkipWhen(OperatingSystem.IsWindows(), "Windows has no pipes in its file system.");
        using BoardFolder board = new();
        string pipe = Path.Combine(aside, "pipe");
        using (Process make = Process.Start("mkfifo", pipe))
        {
            await make.WaitForExitAsync(TestContext.Current.CancellationToken);
        }

        Run run = await board.Check("--out", pipe, "--replace");
        Assert.Equal(73, run.Code);
        Assert.Contains("no ordinary file", run.Error, StringComparison.Ordinal);
        Assert.Equal([pipe], Directory.GetFileSystemEntries(aside));
        using FileStream still = new(pipe, FileMode.Open, FileAccess.ReadWrite);
        Assert.False(still.CanSeek);
    }
}
