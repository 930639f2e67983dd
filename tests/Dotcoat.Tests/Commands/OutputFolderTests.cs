using Colorimetry;

namespace Dotcoat.Tests.Commands;

public sealed class OutputFolderTests : IDisposable
{
    private readonly Workshop _workshop = new();

    private string Folder => _workshop.PathOf("a/b/result");

    public void Dispose() => _workshop.Dispose();

    [Fact]
    public void Write_IntoNewFolder_HoldsTheFilesAndTheirList()
    {
        Write(("one.txt", "1"), ("two.txt", "2"));
        Assert.Equal(["a/b/result/dotcoat-files.txt", "a/b/result/one.txt", "a/b/result/two.txt"], _workshop.Files());
        Assert.Equal("1", _workshop.Read("a/b/result/one.txt"));
    }

    [Fact]
    public void Write_Again_ReplacesItsOwnFilesAndRemovesThoseNoLongerMade()
    {
        Write(("one.txt", "1"), ("two.txt", "2"));
        _workshop.Write("a/b/result/mine.txt", "kept");
        Write(("one.txt", "new"));
        Assert.Equal(["a/b/result/dotcoat-files.txt", "a/b/result/mine.txt", "a/b/result/one.txt"], _workshop.Files());
        Assert.Equal("new", _workshop.Read("a/b/result/one.txt"));
        Assert.Equal("kept", _workshop.Read("a/b/result/mine.txt"));
    }

    [Fact]
    public void Write_OverAPersonsFile_IsRefusedAndChangesNothing()
    {
        Write(("one.txt", "1"));
        _workshop.Write("a/b/result/two.txt", "a person's");
        var refused = Assert.Throws<InputException>(() => Write(("one.txt", "new"), ("two.txt", "2")));
        Assert.Contains("was not written by dotcoat", Assert.Single(refused.Faults).Message, StringComparison.Ordinal);
        Assert.Equal("1", _workshop.Read("a/b/result/one.txt"));
        Assert.Equal("a person's", _workshop.Read("a/b/result/two.txt"));
    }

    [Fact]
    public void Write_OverTheSameBytes_IsDone()
    {
        Directory.CreateDirectory(Folder);
        _workshop.Write("a/b/result/one.txt", "1");
        Write(("one.txt", "1"), ("two.txt", "2"));
        Assert.Equal("2", _workshop.Read("a/b/result/two.txt"));
    }

    [Fact]
    public void Write_OverAFileChangedSince_IsRefused()
    {
        Write(("one.txt", "1"));
        _workshop.Write("a/b/result/one.txt", "edited");
        var refused = Assert.Throws<InputException>(() => Write(("one.txt", "new")));
        Assert.Contains("was changed since", Assert.Single(refused.Faults).Message, StringComparison.Ordinal);
        Assert.Equal("edited", _workshop.Read("a/b/result/one.txt"));
    }

    [Fact]
    public void Write_ThatFailsHalfWay_LeavesNothingBehind()
    {
        // A name with a folder in it cannot be staged: the second file fails after the first was written.
        var refused = Assert.Throws<InputException>(() => Write(("one.txt", "1"), ("missing/two.txt", "2")));
        Assert.Contains("cannot be written", Assert.Single(refused.Faults).Message, StringComparison.Ordinal);
        Assert.Empty(Directory.EnumerateFileSystemEntries(_workshop.Folder));
    }

    [Fact]
    public void Write_ThatFailsInAnExistingFolder_KeepsWhatWasThere()
    {
        Write(("one.txt", "1"));
        Assert.Throws<InputException>(() => Write(("one.txt", "new"), ("missing/two.txt", "2")));
        Assert.Equal(["a/b/result/dotcoat-files.txt", "a/b/result/one.txt"], _workshop.Files());
        Assert.Equal("1", _workshop.Read("a/b/result/one.txt"));
    }

    [Fact]
    public void Write_OnDoctoredList_IsRefused()
    {
        Write(("one.txt", "1"));
        _workshop.Write("keep.txt", "outside");
        _workshop.Write("a/b/result/dotcoat-files.txt", new string('0', 64) + "  ../../../keep.txt\n");
        Assert.Throws<InputException>(() => Write(("one.txt", "new")));
        Assert.Equal("outside", _workshop.Read("keep.txt"));
    }

    [Fact]
    public void Write_WhereAFileStands_IsRefused()
    {
        _workshop.Write("a", "a file");
        Assert.Throws<InputException>(() => Write(("one.txt", "1")));
        Assert.Equal("a file", _workshop.Read("a"));
    }

    private void Write(params (string Name, string Text)[] files) => OutputFolder.Write(
        Folder, [.. files.Select(f => new OutputFile(f.Name, f.Text))], TestContext.Current.CancellationToken);
}
