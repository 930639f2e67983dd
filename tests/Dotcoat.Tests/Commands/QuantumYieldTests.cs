using System.Globalization;
using System.Text;
using System.Text.Json.Nodes;

namespace Dotcoat.Tests.Commands;

/// <summary>dotcoat quantum-yield, as its user runs it, on invented scans.</summary>
public sealed class QuantumYieldTests
{
    private static readonly string[] Scans = ["quantum-yield", "--empty", "a.csv", "--beside", "b.csv", "--in-beam", "c.csv"];

    [Fact]
    public void ThreeScans_GiveAYieldWithItsUncertainty()
    {
        using var workshop = WithScans();
        var document = JsonNode.Parse(workshop.Run([.. Scans, "--pump-nm", "430:470", "--emission-nm", "480:620", "--json", "--out", "result"]).AssertDone().Output)!;
        double value = (double)document["quantum_yield"]!["observed"]!, uncertainty = (double)document["quantum_yield"]!["standard_uncertainty"]!;
        Assert.InRange(value - 0.6, -4 * uncertainty, 4 * uncertainty);
        Assert.InRange(uncertainty, 1e-5, 0.02);
        Assert.Equal("three measurements", (string)document["method"]!);
        foreach (string file in (string[])["quantum-yield.json", "report.html", "sphere-scans.png", "sphere-scans.svg"])
            Assert.Contains(Path.Combine("result", file), workshop.Files(), StringComparer.Ordinal);
    }

    [Fact]
    public void WindowsThatWereGuessed_AreSaid()
    {
        using var workshop = WithScans();
        string text = workshop.Run(Scans).AssertDone().Output;
        string words = string.Join(' ', text.Split((char[]?)null, StringSplitOptions.RemoveEmptyEntries));
        Assert.Contains("--pump-nm sets it", words, StringComparison.Ordinal);
        Assert.Contains("--emission-nm sets it", words, StringComparison.Ordinal);
        Assert.StartsWith("quantum_yield: 0.6", text, StringComparison.Ordinal);
    }

    [Fact]
    public void APieceOfFilm_GivesTheFactorForItsFile()
    {
        using var workshop = WithScans();
        string file = workshop.Read("spectra/demo/desk-monitor.film.yaml");
        Assert.NotEmpty(file);
        var document = JsonNode.Parse(workshop.Run([.. Scans, "--film", "spectra/demo/desk-monitor.film.yaml", "--lot", "red K23", "--json"]).AssertDone().Output)!;
        Assert.InRange((double)document["film"]!["film_yield_factor"]!, 0.1, 1.06);
        Assert.NotNull(document["external_yield"]);
        Assert.Null(document["quantum_yield"]);
    }

    [Theory]
    [InlineData("--pump-nm", "470:430", "the lower first")]
    [InlineData("--emission-nm", "480:900", "covers 420 to 640 nm")]
    [InlineData("--lot", "green", "--lot needs --film")]
    [InlineData("--tail-nm", "600", "--tail-nm needs --dilute")]
    [InlineData("--response-uncertainty-percent", "-1", "0 to 100")]
    public void BadOptions_AreRefused(string option, string value, string message)
    {
        using var workshop = WithScans();
        var outcome = workshop.Run([.. Scans, option, value]);
        Assert.Equal(2, outcome.Status);
        Assert.Equal("", outcome.Output);
        Assert.Contains(message, outcome.Error, StringComparison.Ordinal);
    }

    [Fact]
    public void ScansInTheWrongOrder_AreRefused()
    {
        using var workshop = WithScans();
        Assert.Contains("which scan is which", workshop.Run("quantum-yield", "--empty", "c.csv", "--in-beam", "a.csv").AssertRefused().Error, StringComparison.Ordinal);
    }

    // Yield 0.6, half of the beam absorbed; noise of a fixed pattern.
    private static Workshop WithScans()
    {
        var workshop = Workshop.WithDemo();
        workshop.Write("a.csv", Scan(1000, 0, 1));
        workshop.Write("b.csv", Scan(800, 60, 2));
        workshop.Write("c.csv", Scan(400, 330, 3));
        return workshop;
    }

    private static string Scan(double pump, double emission, int seed)
    {
        var random = new Random(seed);
        var text = new StringBuilder("# invented\nwavelength_nm,photons_per_nm\n");
        for (double nm = 420; nm <= 640; nm += 0.5)
        {
            double value = (pump * Math.Exp(-Math.Pow((nm - 450) / 3, 2)) / (3 * Math.Sqrt(Math.PI)))
                + (emission * Math.Exp(-Math.Pow((nm - 545) / 14, 2)) / (14 * Math.Sqrt(Math.PI))) + (0.01 * (random.NextDouble() - 0.5));
            text.Append(CultureInfo.InvariantCulture, $"{nm},{value:G6}\n");
        }

        return text.ToString();
    }
}
