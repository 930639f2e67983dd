using System.Globalization;
using System.Text.Json.Nodes;

namespace Dotcoat.Tests.Commands;

public sealed class DemoFilmTests
{
    [Theory]
    [InlineData("desk-monitor")]
    [InlineData("living-room-tv")]
    public void Formulate_PutsWhiteOnD65(string name)
    {
        using var workshop = Workshop.WithDemo();
        var outcome = workshop.Run("formulate", $"spectra/demo/{name}.film.yaml", "--json").AssertDone();
        var document = JsonNode.Parse(outcome.Output)!;
        Assert.True((bool)document["solution"]!["reached"]!);
        Assert.InRange((double)document["solution"]!["white_error_xy"]!, 0, 0.0005);
        // Target: D65 as BT.709 and BT.2020 write it, x 0.3127, y 0.3290.
        double x = (double)document["panel"]!["white"]!["x"]!, y = (double)document["panel"]!["white"]!["y"]!;
        Assert.InRange(Math.Sqrt(Math.Pow(x - 0.3127, 2) + Math.Pow(y - 0.3290, 2)), 0, 0.0005);
    }

    // Ranges: common practice, no source (a film's usual recipe).
    [Theory]
    [InlineData("desk-monitor", 0.2, 1.0)]
    [InlineData("living-room-tv", 0.5, 3.0)]
    public void RecipeAndLight_AreThoseOfARealFilm(string name, double leastWtPercent, double mostWtPercent)
    {
        using var workshop = Workshop.WithDemo();
        var document = JsonNode.Parse(workshop.Run("formulate", $"spectra/demo/{name}.film.yaml", "--json").AssertDone().Output)!;
        double mgPerMl = document["solution"]!["loadings_mg_per_ml"]!.AsObject().Sum(l => (double)l.Value!);
        const double hostMgPerMl = 1120;
        Assert.InRange(100 * mgPerMl / hostMgPerMl, leastWtPercent, mostWtPercent);
        var photons = document["photons"]!;
        double unconverted = (double)photons["unconverted"]!, converted = (double)photons["converted"]!;
        Assert.InRange(unconverted / (unconverted + converted), 0.18, 0.28);
        Assert.InRange((double)document["efficiency"]!["external_photon"]!, 0.4, 0.95);
        double singlePass = 1 - Math.Pow(10, -(double)document["layers"]![0]!["optical_density"]!);
        Assert.InRange(singlePass, 0.15, 0.35);
    }

    // FWHM: 22 to 30 nm cadmium-based, 36 to 45 nm indium-based (common practice; 41.5 nm at 630 nm for an indium-based red:
    // Opt. Express 32, 25000 (2024)). First exciton on the blue side of the emission, absorbance rising to the blue.
    [Theory]
    [InlineData("green-k07", 22, 30)]
    [InlineData("green-k11", 22, 30)]
    [InlineData("red-k23", 22, 30)]
    [InlineData("red-k31", 22, 30)]
    [InlineData("green-p04", 36, 45)]
    [InlineData("green-p09", 36, 45)]
    [InlineData("red-p15", 36, 45)]
    [InlineData("red-p18", 36, 45)]
    public void Lot_HasTheLineAndTheBandOfItsFamily(string stem, double leastFwhmNm, double mostFwhmNm)
    {
        using var workshop = Workshop.WithDemo();
        var emission = Column(workshop, $"{stem}-emission.csv");
        Assert.InRange((double)emission["fwhm_nm"]!, leastFwhmNm, mostFwhmNm);
        Assert.True((double)emission["centroid_nm"]! > (double)emission["peak_nm"]!, "the line has its tail on the red side");
        var absorbance = Column(workshop, $"{stem}-absorbance.csv");
        double exciton = (double)absorbance["first_exciton_candidates"]![0]!["wavelength_nm"]!;
        Assert.InRange((double)emission["peak_nm"]! - exciton, 8, 40);
        Assert.InRange((double)absorbance["peak_nm"]!, 360, 365);
    }

    private static JsonNode Column(Workshop workshop, string file) =>
        JsonNode.Parse(workshop.Run("inspect", string.Create(CultureInfo.InvariantCulture, $"spectra/demo/{file}"), "--json").AssertDone().Output)!["columns"]![0]!;
}
