using System.Text;
using CsCheck;

namespace Colorimetry.Tests.Import;

public sealed class BadSpectrumFileTests
{
    private const string Header = "wavelength_nm,power_per_nm\n";

    [Theory]
    [InlineData("", "test.csv: the file holds no rows; a header such as wavelength_nm,power_per_nm and at least two rows are needed.")]
    [InlineData("# only\n\n# comments\n", "test.csv: the file holds no rows")]
    [InlineData("wavelength_nm,power_per_nm\n", "test.csv: rows below the header: 0; at least 2 are needed.")]
    [InlineData("wavelength_nm,power_per_nm\n400,1\n", "test.csv: rows below the header: 1; at least 2 are needed.")]
    [InlineData("400,1\n500,2\n", "test.csv:1:1: the first column is '400'; the first line names the columns")]
    [InlineData("# x\nlambda,power_per_nm\n400,1\n500,2\n", "test.csv:2:1: the first column is 'lambda'")]
    [InlineData("wavelength_nm\n400\n500\n", "test.csv:1: there is one column, wavelength_nm; at least one column of values must follow it")]
    [InlineData("wavelength_nm power_per_nm\n400 1\n500 2\n", "test.csv:1:1: the first column is 'wavelength_nm power_per_nm'")]
    [InlineData("wavelength_nm,,red\n400,1,1\n500,2,2\n", "test.csv:1:15: a column has no name")]
    [InlineData("wavelength_nm,red,red\n400,1,1\n500,2,2\n", "test.csv:1:19: the column 'red' occurs twice")]
    [InlineData(Header + "400,1\n500,x\n", "test.csv:3:5: power_per_nm is 'x'; a finite number is needed.")]
    [InlineData(Header + "400,1\n500,  1.5 V\n", "test.csv:3:7: power_per_nm is '1.5 V'; a finite number is needed.")]
    [InlineData(Header + "400,1\n\"500\", \"x\"\n", "test.csv:3:8: power_per_nm is 'x'; a finite number is needed.")]
    [InlineData("wavelength_nm,power_per_nm,größe\n  400,1, µ\n500,1,1\n", "test.csv:2:10: größe is 'µ'; a finite number is needed.")]
    [InlineData(Header + "400,1\n500,NaN\n", "test.csv:3:5: power_per_nm is 'NaN'; a finite number is needed.")]
    [InlineData(Header + "400,-Infinity\n500,1\n", "test.csv:2:5: power_per_nm is '-Infinity'; a finite number is needed.")]
    [InlineData(Header + "400,1e999\n500,1\n", "test.csv:2:5: power_per_nm is '1e999'; a finite number is needed.")]
    [InlineData(Header + "400,0x10\n500,1\n", "test.csv:2:5: power_per_nm is '0x10'")]
    [InlineData(Header + "400,1\n500,\n", "test.csv:3:5: power_per_nm is missing")]
    [InlineData(Header + "nm,1\n500,1\n", "test.csv:2:1: wavelength_nm is 'nm'")]
    [InlineData(Header + "400,1\n500\n", "test.csv:3: fields in the row: 1; the header has 2.")]
    [InlineData(Header + "400,1\n500,1,5\n", "test.csv:3: fields in the row: 3; the header has 2 (with a decimal comma, separate columns by semicolon or tab).")]
    [InlineData("wavelength_nm;power_per_nm\n400;1;2\n500;1\n", "test.csv:2: fields in the row: 3; the header has 2.")]
    [InlineData(Header + "400,1\n500,1\n450,2\n400,3\n", "test.csv:5: wavelength_nm 400 stands on line 2 already; each occurs once.")]
    [InlineData("wavelength_nm;power_per_nm\n400;1,5\n500;1.5\n", "test.csv:3:5: power_per_nm is '1.5', but the decimal sign on line 2 is ','")]
    [InlineData("wavelength_nm;power_per_nm\n400;1.234,5\n500;1\n", "test.csv:2:5: power_per_nm is '1.234,5'")]
    [InlineData("wavelength_nm;power_per_nm\n400;1,234,5\n500;1\n", "test.csv:2:5: power_per_nm is '1,234,5'")]
    [InlineData(Header + "0.45,1\n0.46,1\n", "test.csv:2:1: the wavelength 0.45 is out of range; 100 to 10000 nm are allowed.")]
    [InlineData(Header + "-400,1\n500,1\n", "test.csv:2:1: the wavelength -400 is out of range")]
    [InlineData("angle_deg,radiance\n0,1\n91,1\n", "test.csv:3:1: the angle 91 is out of range; 0 to 90 degrees are allowed.")]
    [InlineData(Header + "400,\"1\"5\n500,1\n", "test.csv:2: a quotation mark out of place")]
    [InlineData(Header + "400,\"1\n500,1\n", "test.csv:2: a quotation mark out of place")]
    [InlineData(Header + "400,1\u00005\n500,1\n", "test.csv:2:6: the byte 0x00 does not occur in text; this looks like a binary file")]
    public void Read_OfABadFile_SaysWhatIsWrongAndWhere(string text, string expected) => Text.AssertRefused(() => Text.Table(text), expected);

    [Fact]
    public void Read_WithSeveralFaults_GivesAllOfThem()
    {
        InputException refusal = Text.AssertRefused(() => Text.Table(Header + "400,a\n410,1\n410,2\n420\n430,NaN\n"), "test.csv:2:5");
        Assert.Equal([2, 5, 6, 4], refusal.Faults.Select(f => f.Line ?? 0));
    }

    [Fact]
    public void Read_WithEveryRowWrong_GivesTheFirstTenAndTheNumberOfTheOthers()
    {
        InputException refusal = Text.AssertRefused(
            () => Text.Table(Header + string.Concat(Enumerable.Range(400, 100).Select(nm => $"{nm},x\n"))), "test.csv: 90 more faults");
        Assert.Equal(11, refusal.Faults.Count);
    }

    // Source of the first bytes: PNG specification (W3C), the signature and the first chunk of every PNG file.
    [Fact]
    public void Read_OfAPicture_SaysThatItIsBinary() => Text.AssertRefused(
        () => Text.Table([0x89, 0x50, 0x4E, 0x47, 0x0D, 0x0A, 0x1A, 0x0A, 0, 0, 0, 13, 0x49, 0x48, 0x44, 0x52]), "this looks like a binary file");

    [Fact]
    public void Read_OfAVeryLongLine_NamesTheLine() => Text.AssertRefused(
        () => Text.Table(Header + "400,1\n500," + new string('1', 5_000_000) + "\n"), "test.csv:3: the line is longer than 10000 characters");

    [Fact]
    public void Read_OfTooManyRows_NamesTheLimit()
    {
        var text = new StringBuilder(Header);
        for (int i = 0; i <= SpectrumFile.MostRows; i++)
            text.Append(System.Globalization.CultureInfo.InvariantCulture, $"{300 + (i * 0.001):0.000},1\n");
        Text.AssertRefused(() => Text.Table(text.ToString()), "test.csv:200002: there are more rows than the 200000 allowed.");
    }

    [Fact]
    public void Read_OfAHugeFile_IsRefusedWithoutReadingIt()
    {
        string path = Path.Combine(Path.GetTempPath(), Path.GetRandomFileName());
        try
        {
            // Sparse: two gigabytes to the reader, no blocks on the disk.
            using (var file = new FileStream(path, FileMode.CreateNew))
                file.SetLength(2L * 1024 * 1024 * 1024);
            long before = GC.GetAllocatedBytesForCurrentThread();
            Text.AssertRefused(() => SpectrumFile.Read(path), "the file has 2147483648 bytes; a spectrum file has at most 16777216 bytes (16 MiB).");
            Assert.InRange(GC.GetAllocatedBytesForCurrentThread() - before, 0, 1_000_000);
        }
        finally
        {
            File.Delete(path);
        }
    }

    [Fact]
    public void Read_OfAStreamWithoutEnd_StopsAtTheLimit()
    {
        using var endless = new EndlessStream();
        long before = GC.GetAllocatedBytesForCurrentThread();
        Text.AssertRefused(() => SpectrumFile.Read(endless, "pipe"), "pipe: the input does not end; a spectrum file has at most");
        Assert.InRange(endless.Served, SpectrumText.MostBytes, SpectrumText.MostBytes + (1024 * 1024));
        Assert.InRange(GC.GetAllocatedBytesForCurrentThread() - before, 0, 100_000_000);
    }

    [Fact]
    public void Read_OfAMissingFile_SaysSo()
    {
        string path = Path.Combine(Path.GetTempPath(), Path.GetRandomFileName(), "led.csv");
        Text.AssertRefused(() => SpectrumFile.Read(path), $"{path}: there is no such file.");
    }

    [Fact]
    public void Read_OfAFolder_SaysSo() => Text.AssertRefused(
        () => SpectrumFile.Read(Path.GetTempPath()), "this is a folder; a spectrum file is needed.");

    [Theory]
    [InlineData("a\0b.csv")]
    [InlineData(" ")]
    public void Read_OfANameThatIsNone_IsRefused(string path) => Assert.Throws<InputException>(() => SpectrumFile.Read(path));

    // Whatever the bytes are, there is a table or one refusal: no other exception, and nothing but numbers in a table.
    [Fact]
    public void Read_OfAGoodFileWithBytesChanged_IsATableOrARefusal()
    {
        byte[] good = Encoding.UTF8.GetBytes("# x\nwavelength_nm;red;green\n400;0,5;1\n410;\"2\";3e-1\n\n420;-1;0\n");
        byte[] likely = [.. ";,\t\"#\r\n .-+eE019xN\u00e9"u8, 0, 0xFF, 0xFE];
        Gen.Select(Gen.Int[0, good.Length - 1].Array[1, 6], Gen.Int[0, likely.Length - 1].Array[6], Gen.Int[0, 2])
            .Sample((places, changes, how) =>
            {
                List<byte> bytes = [.. good];
                for (int i = 0; i < places.Length; i++)
                {
                    int at = places[i] % bytes.Count;
                    if (how == 0)
                        bytes[at] = likely[changes[i]];
                    else if (how == 1)
                        bytes.Insert(at, likely[changes[i]]);
                    else
                        bytes.RemoveAt(at);
                }

                try
                {
                    SpectrumTable table = Text.Table([.. bytes]);
                    double[] nm = table.WavelengthsNm.ToArray();
                    return nm.Length >= 2 && nm.Zip(nm.Skip(1)).All(p => p.First < p.Second)
                        && table.Columns.All(c => table.Values(c).ToArray().All(double.IsFinite));
                }
                catch (InputException e)
                {
                    return e.Faults.Count > 0 && e.Faults.All(f => !f.ToString().Contains('\n', StringComparison.Ordinal));
                }
            }, iter: 5000);
    }

    private sealed class EndlessStream : Stream
    {
        public long Served { get; private set; }

        public override bool CanRead => true;

        public override bool CanSeek => false;

        public override bool CanWrite => false;

        public override long Length => throw new NotSupportedException();

        public override long Position
        {
            get => throw new NotSupportedException();
            set => throw new NotSupportedException();
        }

        public override int Read(byte[] buffer, int offset, int count)
        {
            buffer.AsSpan(offset, count).Fill((byte)'\n');
            Served += count;
            return count;
        }

        public override void Flush() => throw new NotSupportedException();

        public override long Seek(long offset, SeekOrigin origin) => throw new NotSupportedException();

        public override void SetLength(long value) => throw new NotSupportedException();

        public override void Write(byte[] buffer, int offset, int count) => throw new NotSupportedException();
    }
}
