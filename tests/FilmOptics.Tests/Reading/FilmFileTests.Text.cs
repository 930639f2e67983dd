using Colorimetry;

namespace FilmOptics.Tests.Reading;

/// <summary>Files that are not a film file at all, and all faults at once.</summary>
public sealed class FilmFileTextTests : IDisposable
{
    private readonly FilmFolder _folder = new();

    public void Dispose() => _folder.Dispose();

    [Theory]
    [InlineData("", 1, 1, "nothing here but blanks or comments")]
    [InlineData("# only a comment\n\n", 1, 1, "nothing here but blanks or comments")]
    [InlineData("just words", 1, 1, "keys with values are due")]
    [InlineData("- a\n- b\n", 1, 1, "a list; keys with values are due")]
    [InlineData("title: a\n\tsheet: 1\n", 2, 1, "a tab indents this line")]
    [InlineData("title: [1, 2\nhost: 3\n", 1, 9, "not closed")]
    [InlineData("title: \"abc\n", 1, 8, "not YAML")]
    [InlineData("title: a: b\n", 1, 9, "not YAML")]
    [InlineData("title: @x\n", 1, 8, "not YAML")]
    [InlineData("title: &a x\n", 1, 8, "'&a' is not allowed")]
    [InlineData("title: x\nhost: *a\n", 2, 7, "'*a' is not allowed")]
    [InlineData("title: !!str x\n", 1, 8, "is not allowed; write the value alone")]
    [InlineData("title: x\n---\ntitle: y\n", 2, 1, "second YAML document")]
    [InlineData("? [a, b]\n: c\n", 1, 3, "cannot be a key")]
    [InlineData("title: [[[[[[[[[[[[[[[[x]]]]]]]]]]]]]]]]\n", 1, 20, "nested over 12 deep")]
    public void Parse_NotAFilmFile_IsOneFault(string yaml, int line, int column, string words)
    {
        var fault = Assert.Single(_folder.Faults(yaml));
        Assert.Equal((line, column), (fault.Line, fault.Column));
        Assert.Contains(words, fault.Message, StringComparison.Ordinal);
    }

    [Fact]
    public void Parse_KeyTwice_NamesBothLines()
    {
        var fault = Assert.Single(_folder.Faults(FilmFolder.Whole + "title: again\n"));
        Assert.Equal(1 + FilmFolder.Whole.Count(c => c == '\n'), fault.Line);
        Assert.Contains("'title' stands twice; it stands in line 2 already", fault.Message, StringComparison.Ordinal);
    }

    [Fact]
    public void Parse_AliasBomb_IsRefusedAtItsFirstAnchor()
    {
        string bomb = "a: &a [x, x, x, x]\n" + string.Concat(Enumerable.Range(0, 20).Select(i => $"b{i}: &b{i} [*a, *a, *a, *a]\n"));
        Assert.Equal(1, Assert.Single(_folder.Faults(bomb)).Line);
    }

    [Fact]
    public void Parse_MillionBrackets_IsRefusedQuickly() =>
        Assert.Contains("nested", Assert.Single(_folder.Faults(new string('[', 1_000_000))).Message, StringComparison.Ordinal);

    [Fact]
    public void Parse_CarriageReturns_KeepLinesAndColumns()
    {
        string yaml = FilmFolder.With("quantum_yield: 0.92", "quantum_yield: 2").Replace("\n", "\r\n", StringComparison.Ordinal);
        var fault = Assert.Single(_folder.Faults(yaml));
        Assert.Equal((38, 20), (fault.Line, fault.Column));
        Assert.Equal("Two lots, one layer", _folder.Load(FilmFolder.Whole.Replace("\n", "\r\n", StringComparison.Ordinal)).Film.Title);
    }

    [Fact]
    public void Load_MissingFile_SaysSo() => Assert.Contains("not there", Refusal("missing.film.yaml"), StringComparison.Ordinal);

    [Fact]
    public void Load_Folder_SaysSo() => Assert.Contains("folder", Refusal(""), StringComparison.Ordinal);

    [Fact]
    public void Load_HugeFile_IsRefusedUnread()
    {
        using (var stream = File.Create(_folder.PathOf("huge.film.yaml")))
            stream.SetLength(3L << 30); // sparse
        Assert.Contains("over 1024 KiB", Refusal("huge.film.yaml"), StringComparison.Ordinal);
    }

    [Theory]
    [InlineData(new byte[] { 0x74, 0x00, 0x01 }, "binary (byte 2 is 0)")]
    [InlineData(new byte[] { 0xFF, 0xFE, 0x74, 0x00 }, "UTF-16")]
    [InlineData(new byte[] { 0x74, 0x3A, 0x20, 0xB5, 0x6D }, "not UTF-8")]
    public void Load_NotUtf8Text_IsRefused(byte[] bytes, string words)
    {
        File.WriteAllBytes(_folder.PathOf("odd.film.yaml"), bytes);
        Assert.Contains(words, Refusal("odd.film.yaml"), StringComparison.Ordinal);
    }

    [Fact]
    public void Load_ByteOrderMark_IsNoPartOfTheFirstKey()
    {
        File.WriteAllText(_folder.FilmPath, FilmFolder.Whole, new System.Text.UTF8Encoding(encoderShouldEmitUTF8Identifier: true));
        Assert.Equal("Two lots, one layer", FilmFile.Load(_folder.FilmPath, []).Film.Title);
    }

    [Fact]
    public void Parse_ManyFaults_AreAllNamedInTheOrderOfTheFile()
    {
        string yaml = FilmFolder.Whole
            .Replace("below_reflectance: 0.95", "below_reflectance: 1.95", StringComparison.Ordinal)
            .Replace("thickness_um: 100", "thickness_um: -1", StringComparison.Ordinal)
            .Replace("emission: red-emission.csv", "emission: missing.csv", StringComparison.Ordinal)
            .Replace("view: hemisphere", "vew: hemisphere", StringComparison.Ordinal)
            .Replace("quantum_yield: 0.92", "quantum_yield: 1.92", StringComparison.Ordinal);
        File.WriteAllText(_folder.PathOf("led.csv"), "wavelength_nm,power_per_nm\n360,0\n400,x\n450,1\n500,0\n");
        var faults = _folder.Faults(yaml, "host.refractive_index=5", "nonsense");
        string[] due = ["below_reflectance", "thickness_um", "quantum_yield", "missing.csv", "'vew'"];
        Assert.Equal(due.Length, faults.Count(fault => fault.File == _folder.FilmPath));
        Assert.All(due.Zip(faults), pair => Assert.Contains(pair.First, pair.Second.Message, StringComparison.Ordinal));
        Assert.Contains(faults, fault => fault.File == _folder.PathOf("led.csv") && fault.Line == 3);
        Assert.Contains(faults, fault => fault.File == "--set host.refractive_index=5");
        Assert.Contains(faults, fault => fault.File == "--set nonsense");
    }

    [Fact]
    public void Parse_ThousandsOfFaults_AreCutWithTheirCount()
    {
        string yaml = FilmFolder.Whole + string.Concat(Enumerable.Range(0, 3000).Select(i => $"k{i}: 1\n"));
        var faults = _folder.Faults(yaml);
        Assert.Equal(101, faults.Count);
        Assert.Contains("2900 more faults", faults[^1].Message, StringComparison.Ordinal);
    }

    private string Refusal(string name)
    {
        string path = _folder.PathOf(name);
        var fault = Assert.Single(Assert.Throws<InputException>(() => FilmFile.Load(path, [])).Faults);
        Assert.Equal(path, fault.File);
        return fault.Message;
    }
}
