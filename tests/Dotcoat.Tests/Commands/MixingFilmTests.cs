using System.Globalization;
using System.Text;
using System.Text.Json.Nodes;

namespace Dotcoat.Tests.Commands;

/// <summary>
/// D65 mixes of three Gaussian lines through the whole program: a film that only mixes. Its lots absorb the blue line alone,
/// evenly over it, emit every photon, and nothing is lost: so the light above is the mix of the shares that the loadings set.
/// </summary>
public sealed class MixingFilmTests
{
    private const double OneMillimetre = 1;

    // Source of every figure: computed, independent code (CIE 1931 2°, 1 nm sums 360–830, lines Gaussian in power per nm),
    // printed as photon shares B, G, R; lm/W of the mix; area ratio and coverage of BT.2020 in xy, then in u′v′.
    [Theory]
    [InlineData(450, 20, 530, 20, 630, 20, .2086, .3444, .4469, 284.5, .9908, .9495, 1.1046, .9329)]
    [InlineData(450, 20, 530, 25, 630, 25, .2080, .3487, .4433, 284.6, .9691, .9335, 1.0826, .9232)]
    [InlineData(450, 20, 530, 30, 630, 30, .2072, .3535, .4393, 284.8, .9426, .9109, 1.0558, .9094)]
    [InlineData(450, 20, 525, 30, 630, 30, .1942, .3560, .4498, 273.3, .9731, .9184, 1.0772, .9254)]
    [InlineData(450, 20, 530, 30, 640, 30, .1758, .3078, .5164, 248.3, .9674, .9169, 1.1241, .9214)]
    public void ThreeGaussians_MixToD65(
        double blueNm, double blueFwhmNm, double greenNm, double greenFwhmNm, double redNm, double redFwhmNm,
        double blueShare, double greenShare, double redShare,
        double lumensPerWatt, double areaXy, double coverageXy, double areaUv, double coverageUv)
    {
        using var workshop = new Workshop();
        workshop.Write("blue.csv", Line("power_per_nm", blueNm, blueFwhmNm));
        workshop.Write("green.csv", Line("power_per_nm", greenNm, greenFwhmNm));
        workshop.Write("red.csv", Line("power_per_nm", redNm, redFwhmNm));
        workshop.Write("even.csv", Table("wavelength_nm,absorbance_per_cm", nm => nm <= 485 ? "1" : "0"));
        workshop.Write("filters.csv", Table("wavelength_nm,red,green,blue", nm => nm <= 485 ? "0,0,1" : nm <= 580 ? "0,1,0" : "1,0,0"));
        // Of T = exp(−k d) unconverted, k = ln 10 / 10 × mg/mL per mm, the rest is converted in the ratio of the loadings.
        double both = -Math.Log(blueShare) / (Math.Log(10) / 10 * OneMillimetre);
        workshop.Write("mix.film.yaml", string.Create(CultureInfo.InvariantCulture, $$"""
            title: A film that only mixes
            backlight: {spectrum: blue.csv, incidence: normal}
            cavity: {below_reflectance: 1}
            host: {refractive_index: 1.5}
            layers:
              - name: mix
                thickness_um: 1000
                dots:
                  - {lot: green, loading_mg_per_ml: {{both * greenShare / (greenShare + redShare)}}}
                  - {lot: red, loading_mg_per_ml: {{both * redShare / (greenShare + redShare)}}}
            lots:
              - {name: green, absorbance: even.csv, emission: green.csv, quantum_yield: 1}
              - {name: red, absorbance: even.csv, emission: red.csv, quantum_yield: 1}
            panel: {filters: filters.csv}
            target: {at: panel, white_xy: [0.3127, 0.3290], gamuts: [BT.2020]}
            """));
        var document = JsonNode.Parse(workshop.Run("simulate", "mix.film.yaml", "--model", "beer-lambert", "--json").AssertDone().Output)!;

        // Four printed decimals of a share leave 5e-5 of each: below 3e-4 in xy.
        Assert.Equal(0.3127, (double)document["film"]!["white"]!["x"]!, 3e-4);
        Assert.Equal(0.3290, (double)document["film"]!["white"]!["y"]!, 3e-4);
        Assert.Equal(greenShare, Photons(document, "green"), 3e-4);
        Assert.Equal(redShare, Photons(document, "red"), 3e-4);
        double mixLumensPerWatt = (double)document["film"]!["lumens_per_source_watt"]! / (double)document["efficiency"]!["energy"]!;
        Assert.Equal(lumensPerWatt, mixLumensPerWatt, 0.15);
        var gamut = document["gamut"]![0]!;
        Assert.Equal(areaXy, (double)gamut["area_ratio_xy"]!, 1e-3);
        Assert.Equal(coverageXy, (double)gamut["coverage_xy"]!, 1e-3);
        Assert.Equal(areaUv, (double)gamut["area_ratio_uv"]!, 1e-3);
        Assert.Equal(coverageUv, (double)gamut["coverage_uv"]!, 1e-3);
    }

    private static double Photons(JsonNode document, string band) =>
        (double)document["bands"]!.AsArray().Single(b => (string)b!["name"]! == band)!["photons"]!;

    private static string Line(string column, double peakNm, double fwhmNm) => Table(
        $"wavelength_nm,{column}",
        nm => Math.Exp(-4 * Math.Log(2) * Math.Pow((nm - peakNm) / fwhmNm, 2)).ToString("G9", CultureInfo.InvariantCulture));

    private static string Table(string header, Func<int, string> valuesAt)
    {
        var text = new StringBuilder(header).Append('\n');
        for (int nm = 360; nm <= 830; nm++)
            text.Append(CultureInfo.InvariantCulture, $"{nm},{valuesAt(nm)}\n");
        return text.ToString();
    }
}
