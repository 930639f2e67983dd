using System.Text;

namespace Dotcoat.Tests.Commands;

public sealed class DocumentTablesTests
{
    [Fact]
    public void Of_EachShapeOfTable_KeepsDigitsAndQuotes()
    {
        const string json = """
            {
              "schema": "dotcoat/1", "panel": null, "warnings": ["a"],
              "bands": [{"name": "green, \"A12\"", "photons": 0.10, "peak_nm": null}],
              "spectrum": {"wavelength_nm": [360, 361], "power_per_nm": [1e-3, 0.25]},
              "photons": {"sum": 1.0, "lost_in_lots": {"red C03": 0.5}}
            }
            """;
        var files = DocumentTables.Of(json).ToDictionary(f => f.Name, f => Encoding.UTF8.GetString(f.Bytes), StringComparer.Ordinal);
        Assert.Equal("bands.csv spectrum.csv photons.csv", string.Join(" ", files.Keys));
        Assert.Equal("name,photons,peak_nm\n\"green, \"\"A12\"\"\",0.10,\n", files["bands.csv"]);
        Assert.Equal("wavelength_nm,power_per_nm\n360,1e-3\n361,0.25\n", files["spectrum.csv"]);
        Assert.Equal("key,value\nsum,1.0\nlost_in_lots.red C03,0.5\n", files["photons.csv"]);
    }
}
