using System.Globalization;
using System.Text;
using CsCheck;

namespace Colorimetry.Tests.Import;

public sealed class SpectrumFileTests
{
    private static readonly string[] Separators = [";", "\t", ","];
    private static readonly string[] LineEnds = ["\n", "\r\n", "\r"];
    private static readonly double[] Wavelengths = [440, 450.5, 462];
    private static readonly double[] Powers = [0.5, 1, 0.25];

    public static TheoryData<string> SameTable => new(
        "wavelength_nm,power_per_nm\n440,0.5\n450.5,1\n462,0.25\n",
        "wavelength_nm;power_per_nm\n440;0,5\n450,5;1\n462;0,25\n",
        "wavelength_nm\tpower_per_nm\n440\t0,5\n450,5\t1,0\n462\t,25\n",
        "wavelength_nm,power_per_nm\r\n440,0.5\r\n450.5,1\r\n462,0.25\r\n",
        "wavelength_nm,power_per_nm\r440,0.5\r450.5,1\r462,0.25",
        "# quantity: x; y, z\n\n   # indented\n\nwavelength_nm,power_per_nm\n\n440,0.5\n# in between, 1,2,3\n450.5,1\n,\n462,0.25\n\n\n",
        "wavelength_nm,power_per_nm\n462,2.5e-1\n450.5,+1\n440,5E-01\n",
        "wavelength_nm,power_per_nm\n450.5,1\n462,0.25\n440,0.5\n",
        " wavelength_nm , power_per_nm \n 440 , 0.5 \n 450.5\t, 1 \n 462 , 0.25 \n",
        "wavelength_nm,power_per_nm,\n440,0.5,\n450.5,1,\n462,0.25,\n",
        "\"wavelength_nm\",\"power_per_nm\"\n\"440\",\"0,5\"\n\"450,5\",\"1\"\n\"462\",\"0,25\"\n");

    [Theory]
    [MemberData(nameof(SameTable))]
    public void Read_InAnyNotation_GivesTheSameTable(string text) => AssertSame(Text.Table(text));

    [Fact]
    public void Read_WithAByteOrderMark_GivesTheSameTable()
    {
        const string text = "wavelength_nm,power_per_nm\n440,0.5\n450.5,1\n462,0.25\n";
        foreach (Encoding encoding in new Encoding[] { new UTF8Encoding(true), Encoding.Unicode, Encoding.BigEndianUnicode })
            AssertSame(Text.Table([.. encoding.GetPreamble(), .. encoding.GetBytes(text)]));
    }

    [Fact]
    public void Read_OfSeveralColumns_KeepsNamesOrderAndLines()
    {
        SpectrumTable table = Text.Table("# made up\nwavelength_nm;red;green\n\n700;1;2\n600;3;4\n", "filters/wide.csv");
        Assert.Equal(["red", "green"], table.Columns);
        Assert.Equal("wide.csv", table.Name);
        Assert.Equal("filters/wide.csv", table.Path);
        Assert.Equal([600.0, 700.0], table.WavelengthsNm.ToArray());
        Assert.Equal([4.0, 2.0], table.Values("green").ToArray());
        Assert.Equal([5, 4], new[] { table.LineOf(0), table.LineOf(1) });
        Assert.Equal("filters/wide.csv:4:7: x", table.FaultAt(1, "green", "x").ToString());
    }

    [Fact]
    public void Read_OfATableByAngle_HasAngles()
    {
        SpectrumTable table = Text.Table("angle_deg,radiance\n0,1\n60,0.5\n90,0\n");
        Assert.Equal("angle_deg", table.FirstColumn);
        Assert.Equal([0.0, 60, 90], table.AnglesDeg.ToArray());
        Text.AssertRefused(() => table.WavelengthsNm.Length, "test.csv: the first column is angle_deg; wavelength_nm is needed here.");
    }

    [Fact]
    public void Values_OfAColumnThatIsNotThere_NamesThoseThatAre() => Text.AssertRefused(
        () => Text.Table("wavelength_nm,red,green\n400,1,1\n500,1,1\n").Values("blue").Length, "there is no column blue; the file has red, green.");

    // Order of rows, separator, decimal sign, line ends, comments, blank lines and encoding say nothing about the numbers.
    [Fact]
    public void Read_OfTheSameRowsWrittenOtherwise_IsTheSameTable()
    {
        Gen<double> value = Gen.Double[-1e3, 1e3].Select(v => Math.Round(v, 6));
        var rows = Gen.Select(Gen.Int[3600, 8300].HashSet[2, 40], value.Array[40]);
        Gen.Select(rows, Gen.Int[0, int.MaxValue], Gen.Int[0, 2].Select(i => Separators[i]), Gen.Bool, Gen.Int[0, 2].Select(i => LineEnds[i]))
            .Sample((table, seed, separator, comma, newLine) =>
            {
                double[] nm = [.. table.Item1.Order().Select(w => w / 10.0)];
                double[] values = table.Item2[..nm.Length];
                char sign = comma && separator != "," ? ',' : '.';
                var random = new Random(seed);
                int[] order = [.. Enumerable.Range(0, nm.Length)];
                random.Shuffle(order);
                var text = new StringBuilder($"# source: test{newLine}wavelength_nm{separator}power_per_nm{newLine}");
                foreach (int i in order)
                {
                    if (random.Next(4) == 0)
                        text.Append(random.Next(2) == 0 ? "# a, b; c" : "").Append(newLine);
                    text.Append(Number(nm[i], sign)).Append(separator).Append(Number(values[i], sign)).Append(newLine);
                }

                Encoding encoding = random.Next(2) == 0 ? new UTF8Encoding(true) : Encoding.Unicode;
                SpectrumTable read = Text.Table([.. encoding.GetPreamble(), .. encoding.GetBytes(text.ToString())]);
                return read.WavelengthsNm.SequenceEqual(nm) && read.Values("power_per_nm").SequenceEqual(values);
            }, iter: 500);
    }

    private static string Number(double value, char sign) => value.ToString(CultureInfo.InvariantCulture).Replace('.', sign);

    private static void AssertSame(SpectrumTable table)
    {
        Assert.Equal(["power_per_nm"], table.Columns);
        Assert.Equal(Wavelengths, table.WavelengthsNm.ToArray());
        Assert.Equal(Powers, table.Values("power_per_nm").ToArray());
    }
}
