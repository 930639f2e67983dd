using System.Globalization;
using System.Text;
using System.Text.Json.Nodes;

namespace Dotcoat.Tests.Commands;

public sealed class InspectCommandTests
{
    // Source: computed, independent code (Gaussian in power per nm, CIE 1931 2°, 683 lm/W).
    [Theory]
    [InlineData(450, 20, 0.15516, 0.01947, 27.64)]
    [InlineData(530, 30, 0.17615, 0.76954, 558.69)]
    [InlineData(630, 30, 0.69565, 0.30423, 192.70)]
    public void Light_HasThePeakAndColourOfItsGaussian(double peakNm, double fwhmNm, double x, double y, double lumensPerWatt)
    {
        var column = Inspect(Curve("power_per_nm", 380, 780, 1, nm => Gaussian(nm, peakNm, fwhmNm)));
        Assert.Equal(peakNm, (double)column["peak_nm"]!, 0.05);
        Assert.Equal(fwhmNm, (double)column["fwhm_nm"]!, 0.05);
        Assert.Equal(peakNm, (double)column["centroid_nm"]!, 0.05);
        // Area of a Gaussian line: FWHM √(π / (4 ln 2)).
        Assert.Equal(fwhmNm * Math.Sqrt(Math.PI / (4 * Math.Log(2))), (double)column["integral"]!, 0.01);
        // The shipped 5 nm table, interpolated, against the 1 nm table.
        Assert.Equal(x, (double)column["colour"]!["x"]!, 2e-4);
        Assert.Equal(y, (double)column["colour"]!["y"]!, 2e-4);
        // The dominant wavelength of a narrow line lies near its peak, and its colour near the locus.
        Assert.InRange((double)column["colour"]!["dominant_nm"]!, peakNm - 10, peakNm + 10);
        Assert.InRange((double)column["colour"]!["excitation_purity"]!, 0.85, 1.001);
        Assert.Null(column["colour"]!["complementary_nm"]);
        Assert.Equal(lumensPerWatt, (double)column["colour"]!["luminous_efficacy_lm_per_w"]!, lumensPerWatt * 2e-3);
    }

    [Fact]
    public void Light_CutOffWhileStillBright_HasFiguresButNoColour()
    {
        using var workshop = new Workshop();
        workshop.Write("cut.csv", Curve("power_per_nm", 440, 600, 1, nm => Gaussian(nm, 450, 20)));
        var document = JsonNode.Parse(workshop.Run("inspect", "cut.csv", "--json").AssertDone().Output)!;
        Assert.Null(document["columns"]![0]!["colour"]);
        Assert.Equal(450, (double)document["columns"]![0]!["peak_nm"]!, 0.05);
        Assert.NotEmpty(document["warnings"]!.AsArray());
    }

    [Fact]
    public void Absorbance_WithAMaximumAndAShoulder_NamesBothFromTheRed()
    {
        // Excitons put at 520 and 470 nm, on a band rising to the blue.
        var column = Inspect(Curve("absorbance_per_cm", 360, 700, 2, nm =>
            Gaussian(nm, 520, 26) + (0.09 * Gaussian(nm, 470, 26)) + (3 * Math.Exp(-(nm - 360) / 45))));
        var candidates = column["first_exciton_candidates"]!.AsArray();
        Assert.Equal(520, (double)candidates[0]!["wavelength_nm"]!, 3.0);
        Assert.False((bool)candidates[0]!["shoulder"]!);
        Assert.Equal(470, (double)candidates[1]!["wavelength_nm"]!, 6.0);
        Assert.True((bool)candidates[1]!["shoulder"]!);
    }

    [Fact]
    public void Absorbance_ThatOnlyRises_HasNoCandidate() =>
        Assert.Empty(Inspect(Curve("absorbance_per_cm", 360, 700, 2, nm => 3 * Math.Exp(-(nm - 360) / 45)))["first_exciton_candidates"]!.AsArray());

    [Fact]
    public void Filter_HasItsEdgesAtHalfOfThePeak()
    {
        var edges = Inspect(Curve("transmittance", 380, 780, 5, nm => nm < 500 ? 0 : nm < 520 ? (nm - 500) / 20 * 0.8 : nm < 580 ? 0.8 : nm < 600 ? (600 - nm) / 20 * 0.8 : 0))["half_peak_edges"]!.AsArray();
        Assert.Equal(2, edges.Count);
        Assert.Equal(510, (double)edges[0]!["wavelength_nm"]!, 1e-9);
        Assert.True((bool)edges[0]!["rising"]!);
        Assert.Equal(590, (double)edges[1]!["wavelength_nm"]!, 1e-9);
        Assert.False((bool)edges[1]!["rising"]!);
    }

    [Fact]
    public void AngleTable_HasItsMeanOverTheHemisphere()
    {
        using var workshop = new Workshop();
        // 1 − θ/90° weighted by sin θ cos θ has the mean 1 − (2/π) ∫ θ sin 2θ dθ = 1/2 exactly.
        workshop.Write("angles.csv", "angle_deg,reflectance\n0,1\n30,0.6666666667\n60,0.3333333333\n90,0\n");
        var document = JsonNode.Parse(workshop.Run("inspect", "angles.csv", "--json").AssertDone().Output)!;
        Assert.Equal(0.5, (double)document["columns"]![0]!["hemisphere_mean"]!, 1e-6);
        Assert.Equal(30, (double)document["step_deg"]!);
        Assert.Contains("cosine: 0.5", workshop.Run("inspect", "angles.csv").AssertDone().AssertPlain().Output, StringComparison.Ordinal);
    }

    [Fact]
    public void ShippedFiles_AllReadAndPrintPlainly()
    {
        using var workshop = new Workshop();
        foreach (string file in Directory.EnumerateFiles(Path.Combine(Repository.Root, "spectra"), "*.csv", SearchOption.AllDirectories))
            workshop.Run("inspect", file).AssertDone().AssertPlain();
    }

    private static JsonNode Inspect(string text)
    {
        using var workshop = new Workshop();
        workshop.Write("curve.csv", text);
        return JsonNode.Parse(workshop.Run("inspect", "curve.csv", "--json").AssertDone().Output)!["columns"]![0]!;
    }

    private static double Gaussian(double nm, double peakNm, double fwhmNm) => Math.Exp(-4 * Math.Log(2) * Math.Pow((nm - peakNm) / fwhmNm, 2));

    private static string Curve(string column, int fromNm, int toNm, int stepNm, Func<double, double> valueAt)
    {
        var text = new StringBuilder($"wavelength_nm,{column}\n");
        for (int nm = fromNm; nm <= toNm; nm += stepNm)
            text.Append(CultureInfo.InvariantCulture, $"{nm},{valueAt(nm):G9}\n");
        return text.ToString();
    }
}
