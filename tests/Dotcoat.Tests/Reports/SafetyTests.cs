using Colorimetry;
using FilmOptics;
using FilmReports.Safety;

namespace Dotcoat.Tests.Reports;

public sealed class SafetyTests
{
    // Source: IEC 62471:2006 and ICNIRP 2013, weighting table; 500 to 600 nm by the formula there, 600 to 700 nm 0.001.
    [Theory]
    [InlineData(379, 0)]
    [InlineData(380, 0.01)]
    [InlineData(385, 0.013)]
    [InlineData(395, 0.05)]
    [InlineData(400, 0.1)]
    [InlineData(415, 0.8)]
    [InlineData(417, 0.84)] // a straight line between the rows
    [InlineData(430, 0.98)]
    [InlineData(435, 1)]
    [InlineData(440, 1)]
    [InlineData(445, 0.97)]
    [InlineData(455, 0.9)]
    [InlineData(470, 0.62)]
    [InlineData(490, 0.22)]
    [InlineData(500, 0.1)]
    [InlineData(550, 0.01)]
    [InlineData(600, 0.001)]
    [InlineData(700, 0.001)]
    [InlineData(701, 0)]
    public void Weighting_MatchesThePublishedRow(int wavelengthNm, double weight) => Assert.Equal(weight, BlueLightHazard.Weighting[wavelengthNm], 1e-12);

    // Computed with independent code: power-weighted B of Gaussian lines, 1 nm sums; one unit of the last digit.
    [Theory]
    [InlineData(450, 20, 0.9127)]
    [InlineData(455, 20, 0.8577)]
    [InlineData(460, 20, 0.7876)]
    [InlineData(530, 30, 0.0301)]
    public void Weighting_OfALine_MatchesIndependentCode(double peakNm, double fwhmNm, double expected)
    {
        var light = Spectrum.Gaussian<WattPerNm>(peakNm, fwhmNm);
        Assert.Equal(expected, (light * BlueLightHazard.Weighting).Integral / light.Integral, 1e-4);
    }

    // Computed with independent code, mW/lm; one unit of the last digit.
    [Theory]
    [InlineData(6504, 1.046)]
    [InlineData(2856, 0.307)]
    public void WattPerLumen_OfABlackBody_MatchesIndependentCode(double kelvin, double expected) =>
        Assert.Equal(expected, BlueLightHazard.WattPerLumen(BlackBody(kelvin))!.Value * 1000, 1e-3);

    // As above: D65 mixes of a blue line with 530/30 and 630/30; and the share of 415–455 nm in 400–500 nm of the blue line alone and of the mix.
    [Theory]
    [InlineData(450, 0.849, 0.722, 0.712)]
    [InlineData(455, 0.819, 0.500, 0.494)]
    [InlineData(460, 0.797, 0.278, 0.275)]
    public void BlueLight_OfAD65Mix_MatchesIndependentCode(double bluePeakNm, double hazard, double shareAlone, double shareInMix)
    {
        var blue = Spectrum.Gaussian<WattPerNm>(bluePeakNm, 20);
        var mix = MixedToD65(blue, Spectrum.Gaussian<WattPerNm>(530, 30), Spectrum.Gaussian<WattPerNm>(630, 30));
        var figures = BlueLight.Of("mix", mix);
        Assert.Equal(hazard, figures.HazardWattPerLumen!.Value * 1000, 1e-3);
        Assert.Equal(shareInMix, figures.ShortBlueShare!.Value, 1e-3);
        Assert.Equal(shareAlone, BlueLight.Of("blue", blue).ShortBlueShare!.Value, 1e-3);
    }

    // Computed with independent code: 445/20 alone, and a black body.
    [Fact]
    public void ShortBlueShare_OfALineAndABlackBody_MatchesIndependentCode()
    {
        Assert.Equal(0.880, BlueLight.Of("445", Spectrum.Gaussian<WattPerNm>(445, 20)).ShortBlueShare!.Value, 1e-3);
        Assert.Equal(0.403, BlueLight.Of("6504 K", BlackBody(6504)).ShortBlueShare!.Value, 1e-3);
    }

    [Fact]
    public void BlueLight_OfRedLight_HasNoShareAndOfNoneNothing()
    {
        Assert.Null(BlueLight.Of("none", Spectrum.Flat<WattPerNm>(0, "dark")).HazardWattPerLumen);
        Assert.Null(BlueLight.Of("red", Spectrum.Sampled<WattPerNm>(nm => nm > 600 ? 1 : 0, "red")).ShortBlueShare);
    }

    // A filter that lets everything through changes no ratio; the panel's white comes first.
    [Fact]
    public void BlueLight_BehindClearFilters_IsThatOfTheFilm()
    {
        var (demo, appraisal) = ReportFilms.Named("desk-monitor");
        var clear = Spectrum.Flat<Fraction>(1, "clear");
        var figures = BlueLight.Of(demo with { Panel = new Panel(clear, clear, clear) }, appraisal);
        Assert.Equal((string[])["panel white", "film"], figures.Select(f => f.Light).ToArray());
        Assert.Equal(figures[1].HazardWattPerLumen!.Value, figures[0].HazardWattPerLumen!.Value, 1e-12);
        Assert.Equal(figures[1].ShortBlueShare!.Value, figures[0].ShortBlueShare!.Value, 1e-12);
    }

    // Areal mass = mass share x thickness x density, computed with independent code: a layer of 1.1 g/mL.
    // 100 mg/kg in 100 µm is 0.0110 µg/mm²; 0.2 µg/mm² is 1818 mg/kg in 100 µm, 3636 in 50 µm, 1212 in 150 µm.
    [Theory]
    [InlineData(100, 0.0110, 100, 5e-5)]
    [InlineData(100, 0.2, 1818, 5e-4)]
    [InlineData(50, 0.2, 3636, 5e-4)]
    [InlineData(150, 0.2, 1212, 5e-4)]
    public void Metals_PerMassAndPerArea_MatchTheArithmetic(double thicknessUm, double ugPerMm2, double mgPerKg, double within)
    {
        double cadmiumMgPerMl = mgPerKg * 1.1 / 1000;
        var layer = Assert.Single(RestrictedSubstances.Of(FilmOf(thicknessUm, loadingMgPerMl: cadmiumMgPerMl / 0.1, cadmiumShare: 0.1, leadShare: 0, densityGPerMl: 1.1)));
        Assert.Equal(mgPerKg, layer.CadmiumMgPerKg!.Value, mgPerKg * 1e-12);
        Assert.Equal(ugPerMm2, layer.CadmiumUgPerMm2!.Value, within);
        Assert.Equal(0, layer.LeadMgPerKg);
        Assert.Equal(0, layer.LeadUgPerMm2);
    }

    // Source: atomic masses (Cd 112.41, Se 78.97; Pb 207.2 in CsPbBr3 of 579.8): shares 0.58737 and 0.35735, computed with independent code.
    [Fact]
    public void Metals_OfBareSelenideAndOfPerovskite_FollowTheMassShares()
    {
        var layer = Assert.Single(RestrictedSubstances.Of(FilmOf(100, loadingMgPerMl: 10, cadmiumShare: 0.58737, leadShare: 0.35735, densityGPerMl: 1.1)));
        Assert.Equal(0.58737, layer.CadmiumUgPerMm2!.Value, 1e-9); // 10 mg/mL over 0.1 mm is 1 µg/mm² of dots
        Assert.Equal(0.35735, layer.LeadUgPerMm2!.Value, 1e-9);
    }

    [Fact]
    public void Metals_WithWhatIsMissing_AreNotKnownRatherThanNone()
    {
        var noShare = Assert.Single(RestrictedSubstances.Of(FilmOf(100, 10, null, 0, 1.1)));
        Assert.Null(noShare.CadmiumMgPerKg);
        Assert.Null(noShare.CadmiumUgPerMm2);
        Assert.Equal(0, noShare.LeadMgPerKg);
        var noDensity = Assert.Single(RestrictedSubstances.Of(FilmOf(100, 10, 0.1, 0, null)));
        Assert.Null(noDensity.CadmiumMgPerKg);
        Assert.Equal(0.1, noDensity.CadmiumUgPerMm2!.Value, 1e-12);
        // A lot that is listed but not used takes nothing away from what is known.
        Assert.Equal(0, Assert.Single(RestrictedSubstances.Of(FilmOf(100, 0, null, 0, 1.1))).CadmiumMgPerKg);
    }

    [Fact]
    public void Cautions_NameTheTextTheLaboratoryTheOfficerAndTheDataSheets()
    {
        var (demo, appraisal) = ReportFilms.Named("desk-monitor");
        string text = string.Join('\n', Cautions.For(demo, appraisal));
        foreach (string needed in (string[])["415–455 nm", "IEC 62471", "competent laboratory", "mg/kg", "µg/mm²", "2011/65/EU", "2024/1416", "21 November 2025", "compliance officer", "safety data sheets"])
            Assert.Contains(needed, text, StringComparison.Ordinal);
    }

    private static Film FilmOf(double thicknessUm, double loadingMgPerMl, double? cadmiumShare, double? leadShare, double? densityGPerMl)
    {
        var demo = ReportFilms.Named("desk-monitor").Case.Film;
        var lot = demo.Lots[0] with { DensityGPerMl = densityGPerMl, CadmiumMassShare = cadmiumShare, LeadMassShare = leadShare };
        return demo with
        {
            Lots = [lot],
            Layers = [demo.Layers[0] with { ThicknessMm = thicknessUm / 1000, HostDensityGPerMl = 1.1, Dots = [new DotLoading(lot, loadingMgPerMl)] }],
        };
    }

    // Planck's law with c2 of CIE 15:2018.
    private static Spectrum<WattPerNm> BlackBody(double kelvin) => Spectrum.Sampled<WattPerNm>(
        nm => Math.Pow(560 / nm, 5) / (Math.Exp(PlanckianLocus.C2MetreKelvin / (nm * 1e-9 * kelvin)) - 1), "black body");

    private static Spectrum<WattPerNm> MixedToD65(params Spectrum<WattPerNm>[] lines)
    {
        var white = Tristimulus.From(new Chromaticity(0.3127, 0.3290), 1);
        Tristimulus[] c = [.. lines.Select(l => Tristimulus.Of(l, StandardObserver.Cie1931))];
        double all = Determinant(c[0], c[1], c[2]);
        return lines[0].ScaledBy(Determinant(white, c[1], c[2]) / all)
            + lines[1].ScaledBy(Determinant(c[0], white, c[2]) / all)
            + lines[2].ScaledBy(Determinant(c[0], c[1], white) / all);
    }

    private static double Determinant(Tristimulus a, Tristimulus b, Tristimulus c) =>
        (a.X * ((b.Y * c.Z) - (c.Y * b.Z))) - (b.X * ((a.Y * c.Z) - (c.Y * a.Z))) + (c.X * ((a.Y * b.Z) - (b.Y * a.Z)));
}
