using System.Globalization;

namespace Colorimetry.Tests;

public sealed class StandardObserverTests
{
    // Source: CIE 018:2019 / ISO/CIE 11664-1:2019, rows of the published tables.
    [Theory]
    [InlineData(360, "0.0001299", "0.000003917", "0.0006061")]
    [InlineData(380, "0.001368", "0.000039", "0.006450")]
    [InlineData(445, "0.34806", "0.0298", "1.78260")]
    [InlineData(555, "0.512050", "1.000000", "0.005750")]
    [InlineData(600, "1.062200", "0.631000", "0.000800")]
    [InlineData(780, "0.00004151", "0.00001499", "0.0")]
    public void Cie1931_AtAPublishedRow_IsThatRow(int nm, string x, string y, string z) => AssertRow(StandardObserver.Cie1931, nm, x, y, z);

    // Source: as above, 10 degrees.
    [Theory]
    [InlineData(360, "0.0000001222", "0.000000013398", "0.000000535027")]
    [InlineData(450, "0.370702", "0.089456", "1.994800")]
    [InlineData(555, "0.616053", "0.999110", "0.001091")]
    [InlineData(600, "1.123990", "0.658341", "0.000000")]
    public void Cie1964_AtAPublishedRow_IsThatRow(int nm, string x, string y, string z) => AssertRow(StandardObserver.Cie1964, nm, x, y, z);

    // Source: in each row of the file. Tolerances: what Sprague's interpolation of the 5 nm table leaves, measured over all 471 rows.
    [Fact]
    public void Observers_BetweenPublishedRows_AreNearTheTrue1NmTables()
    {
        int rows = 0;
        foreach (string line in File.ReadLines(Path.Combine(Repository.Root, "tests/Colorimetry.Tests/Data/observers-1nm.csv")).Skip(2))
        {
            string[] fields = line.Split(',', 6);
            (StandardObserver observer, double x, double y, double z) = fields[0] == "CIE 1931 2°"
                ? (StandardObserver.Cie1931, 1.0e-4, 4.8e-5, 4.8e-4)
                : (StandardObserver.Cie1964, 7.2e-4, 1.7e-3, 3.4e-3);
            int nm = int.Parse(fields[1], CultureInfo.InvariantCulture), i = WavelengthGrid.IndexOf(nm);
            Published.AssertWithin(double.Parse(fields[2], CultureInfo.InvariantCulture), observer.XBar[i], x, $"{fields[0]} x_bar at {nm} nm");
            Published.AssertWithin(double.Parse(fields[3], CultureInfo.InvariantCulture), observer.YBar[i], y, $"{fields[0]} y_bar at {nm} nm");
            Published.AssertWithin(double.Parse(fields[4], CultureInfo.InvariantCulture), observer.ZBar[i], z, $"{fields[0]} z_bar at {nm} nm");
            rows++;
        }

        Assert.Equal(106, rows);
    }

    // Source: CIE 018:2019; sums computed from its 1 nm and 5 nm tables by independent code. CIE 15's older four-digit table: 21.3714, 21.3711, 21.3715 (from memory).
    [Theory]
    [InlineData(5, 380, 780, 21.371525, 21.371328, 21.371540, 1e-5)]
    [InlineData(1, 360, 830, 106.865469, 106.856917, 106.892251, 2e-4)] // of the CIE's own 1 nm table; ours is interpolated
    public void Cie1931_Summed_HasThePublishedSums(int stepNm, int firstNm, int lastNm, double x, double y, double z, double tolerance)
    {
        double sumX = 0, sumY = 0, sumZ = 0;
        for (int nm = firstNm; nm <= lastNm; nm += stepNm)
        {
            int i = WavelengthGrid.IndexOf(nm);
            sumX += StandardObserver.Cie1931.XBar[i];
            sumY += StandardObserver.Cie1931.YBar[i];
            sumZ += StandardObserver.Cie1931.ZBar[i];
        }

        Published.AssertWithin(x, sumX, tolerance, "sum of x_bar");
        Published.AssertWithin(y, sumY, tolerance, "sum of y_bar");
        Published.AssertWithin(z, sumZ, tolerance, "sum of z_bar");
    }

    [Fact]
    public void Observers_Everywhere_AreNotNegative()
    {
        foreach (StandardObserver observer in new[] { StandardObserver.Cie1931, StandardObserver.Cie1964 })
        {
            for (int i = 0; i < WavelengthGrid.Count; i++)
                Assert.True(observer.XBar[i] >= 0 && observer.YBar[i] >= 0 && observer.ZBar[i] >= 0, $"{observer.Name} at {WavelengthGrid.NmAt(i)} nm");
        }
    }

    // Source: CIE 170-2:2015 tables begin at 390 nm, so an observer file may.
    [Fact]
    public void FromTable_From390Nm_IsZeroBelow()
    {
        StandardObserver observer = StandardObserver.FromTable(Text.Table(Rows(390, 780, 5)));
        Assert.Equal(0, observer.YBar[WavelengthGrid.IndexOf(389)]);
        Assert.Equal(1, observer.YBar[WavelengthGrid.IndexOf(390)], 12);
        Assert.Equal("test", observer.Name);
    }

    [Theory]
    [InlineData(400, 780, 5, "reach from 400 to 780 nm")]
    [InlineData(390, 700, 5, "reach from 390 to 700 nm")]
    [InlineData(380, 780, 10, "even steps of at most that")]
    public void FromTable_TooShortOrTooCoarse_IsRefused(int first, int last, int step, string expected) =>
        Text.AssertRefused(() => StandardObserver.FromTable(Text.Table(Rows(first, last, step))), expected);

    [Fact]
    public void FromTable_WithANegativeValue_NamesItsPlace() => Text.AssertRefused(
        () => StandardObserver.FromTable(Text.Table(Rows(390, 780, 5).Replace("\n500,1,1,1", "\n500,1,-0.5,1", StringComparison.Ordinal))),
        "test.csv:24:7: y_bar is -0.5 at 500 nm; at least 0 is allowed.");

    private static string Rows(int first, int last, int step) => "wavelength_nm,x_bar,y_bar,z_bar\n"
        + string.Concat(Enumerable.Range(0, ((last - first) / step) + 1).Select(i => $"{first + (i * step)},1,1,1\n"));

    private static void AssertRow(StandardObserver observer, int nm, string x, string y, string z)
    {
        int i = WavelengthGrid.IndexOf(nm);
        Published.AssertMatches(x, observer.XBar[i], $"{observer.Name} x_bar at {nm} nm");
        Published.AssertMatches(y, observer.YBar[i], $"{observer.Name} y_bar at {nm} nm");
        Published.AssertMatches(z, observer.ZBar[i], $"{observer.Name} z_bar at {nm} nm");
    }
}
