using System.Globalization;
using Colorimetry;
using static FilmOptics.Tests.FilmGenerators;

namespace FilmOptics.Tests;

public sealed class FilmAppraiserTests
{
    // Three Gaussians in power (450/20, 530/30, 630/30 and others) mixed to D65: peak and FWHM; area ratio and coverage of BT.2020 in xy and
    // u'v'; coverage of P3 in xy; power and photon shares of blue, green, red; lm/W of the mixture.
    // Source: computed with independent code from the CIE 1931 table at 1 nm; ours is interpolated from 5 nm, so one unit of the last digit is allowed.
    public static TheoryData<string> Mixtures =>
    [
        "450/20 530/20 630/20 | .9908 .9495 1.1046 .9329 .9989 | .2543 .3565 .3892 | .2086 .3444 .4469 | 284.5",
        "450/20 530/25 630/25 | .9691 .9335 1.0826 .9232 .9986 | .2535 .3607 .3858 | .2080 .3487 .4433 | 284.6",
        "450/20 530/30 630/30 | .9426 .9109 1.0558 .9094 .9968 | .2524 .3655 .3821 | .2072 .3535 .4393 | 284.8",
        "450/20 530/35 630/35 | .9118 .8836 1.0247 .8913 .9891 | .2510 .3708 .3783 | .2062 .3587 .4351 | 285.1",
        "450/20 530/40 630/40 | .8770 .8522 .9897 .8689 .9798 | .2493 .3764 .3744 | .2049 .3643 .4308 | 285.4",
        "455/20 530/30 630/30 | .9416 .9184 1.0273 .9203 .9975 | .2571 .3575 .3854 | .2130 .3450 .4421 | 282.9",
        "460/20 530/30 630/30 | .9391 .9269 .9888 .9320 .9976 | .2683 .3448 .3868 | .2245 .3324 .4432 | 278.8",
        "450/20 525/30 630/30 | .9731 .9184 1.0772 .9254 .9705 | .2367 .3719 .3915 | .1942 .3560 .4498 | 273.3",
        "450/20 530/30 640/30 | .9674 .9169 1.1241 .9214 .9947 | .2197 .3266 .4537 | .1758 .3078 .5164 | 248.3",
        "450/20 540/36 625/40 | .7925 .7704 .9006 .7988 .9905 | .2901 .3873 .3226 | .2411 .3864 .3725 | 320.5",
    ];

    [Theory]
    [MemberData(nameof(Mixtures))]
    public void FilmThatOnlyMixes_AtD65_MatchesTheRow(string row)
    {
        string[] fields = row.Split('|', StringSplitOptions.TrimEntries);
        double[][] lines = [.. fields[0].Split(' ').Select(line => line.Split('/').Select(n => double.Parse(n, CultureInfo.InvariantCulture)).ToArray())];
        string[] powerShares = fields[2].Split(' '), photonShares = fields[3].Split(' '), areas = fields[1].Split(' ');
        var appraisal = Appraise(Mixing(lines, [.. powerShares.Select(s => double.Parse(s, CultureInfo.InvariantCulture))]));

        // The printed shares are rounded to half of 1e-4, which moves white by up to 2e-4.
        Assert.Equal(0.3127, appraisal.FilmWhite.Chromaticity.X, 3e-4);
        Assert.Equal(0.3290, appraisal.FilmWhite.Chromaticity.Y, 3e-4);
        AssertPrinted(fields[4], appraisal.FilmLumensPerSourceWatt / appraisal.Efficiency.EnergyShare, "lm/W of the mixture");
        double photons = appraisal.Bands.Sum(band => band.Photons);
        for (int i = 0; i < 3; i++)
        {
            AssertPrinted(photonShares[i], appraisal.Bands[i].Photons / photons, $"photon share {i}");
        }

        // The primaries of the row are the lines themselves, without filters.
        var (red, green, blue) = (Colour(appraisal.ConvertedPowerByLot[1]), Colour(appraisal.ConvertedPowerByLot[0]), Colour(appraisal.UnconvertedPower));
        var (bt2020, p3) = (ColourGamut.Named("BT.2020"), ColourGamut.Named("DCI-P3"));
        AssertPrinted(areas[0], GamutCoverage.AreaRatio(red, green, blue, bt2020, ChromaticityDiagram.Xy1931), "area xy");
        AssertPrinted(areas[1], GamutCoverage.Coverage(red, green, blue, bt2020, ChromaticityDiagram.Xy1931), "coverage xy");
        AssertPrinted(areas[2], GamutCoverage.AreaRatio(red, green, blue, bt2020, ChromaticityDiagram.UvPrime1976), "area u'v'");
        AssertPrinted(areas[3], GamutCoverage.Coverage(red, green, blue, bt2020, ChromaticityDiagram.UvPrime1976), "coverage u'v'");
        AssertPrinted(areas[4], GamutCoverage.Coverage(red, green, blue, p3, ChromaticityDiagram.Xy1931), "P3 coverage");
    }

    // Narrow lines behind filters that each pass one of them alone: the panel's primaries are the lines, and the row's gamut its gamut.
    [Fact]
    public void PanelOfIdealFilters_MatchesTheRow()
    {
        var filmCase = Mixing([[450, 20], [530, 20], [630, 20]], [.2543, .3565, .3892]) with
        {
            Panel = new(Band(580, 831), Band(490, 580), Band(360, 490), 0.25, 0.25, 0.25),
        };
        var appraisal = Appraise(filmCase);
        Assert.Equal("BT.2020, DCI-P3", string.Join(", ", appraisal.Gamut!.Select(g => g.Name)));
        AssertPrinted(".9908", appraisal.Gamut![0].AreaRatioXy, "area xy");
        AssertPrinted(".9495", appraisal.Gamut[0].CoverageXy, "coverage xy");
        AssertPrinted("1.1046", appraisal.Gamut[0].AreaRatioUv, "area u'v'");
        AssertPrinted(".9329", appraisal.Gamut[0].CoverageUv, "coverage u'v'");
        AssertPrinted(".9989", appraisal.Gamut[1].CoverageXy, "P3 coverage");
        // Equal shares leave white as it is, and a quarter of the light.
        Assert.Equal(appraisal.FilmWhite.Chromaticity.X, appraisal.Panel!.White.Chromaticity.X, 1e-12);
        Assert.Equal(appraisal.FilmLumensPerSourceWatt / 4, appraisal.Panel.LumensPerSourceWatt, 1e-9);
    }

    [Fact]
    public void AreaShares_MoveWhite_AndNotThePrimaries()
    {
        var even = Mixing([[450, 20], [530, 30], [630, 30]], [.25, .37, .38]) with { Panel = new(Band(580, 831), Band(490, 580), Band(360, 490), 0.2, 0.2, 0.2) };
        var moreBlue = even with { Panel = even.Panel! with { BlueAreaShare = 0.4 } };
        var (one, two) = (Appraise(even).Panel!, Appraise(moreBlue).Panel!);
        Assert.Equal(one.Blue, two.Blue);
        Assert.Equal(one.Red, two.Red);
        Assert.True(two.White.Chromaticity.X < one.White.Chromaticity.X && two.White.CctKelvin is null or > 8000);
        Assert.True(two.LumensPerSourceWatt > one.LumensPerSourceWatt);
    }

    [Fact]
    public void Gamuts_OfTheTarget_AreThoseCompared()
    {
        var filmCase = Mixing([[450, 20], [530, 20], [630, 20]], [.25, .36, .39]) with
        {
            Panel = new(Band(580, 831), Band(490, 580), Band(360, 490)),
            Target = new(TargetPlace.Panel, TargetView.Hemisphere, 0.3127, 0.329, 1e-3, [], ["NTSC 1953"]),
        };
        Assert.Equal("NTSC 1953", Assert.Single(Appraise(filmCase).Gamut!).Name);
        Assert.Null(Appraise(filmCase with { Panel = null }).Gamut);
        Assert.Null(Appraise(filmCase with { Panel = null }).Panel);
    }

    // Each definition of physics worked out by hand on a film with one wavelength in and one out.
    [Fact]
    public void Efficiencies_OfOneLine_FollowTheirDefinitions()
    {
        var lot = Lot("lot", Spectrum.Sampled<PhotonPerNm>(nm => nm == 600 ? 1 : 0, "600 nm"), nm => nm == 450 ? 10 * Math.Log10(2) : 0, 0.8);
        var film = Film([Layer(1, [new(lot, 1)])], [lot], Cavity(1, 0, 0.1), Incidence.Normal) with
        {
            Backlight = new(Spectrum.Sampled<PhotonPerNm>(nm => nm == 450 ? 1 : 0, "450 nm"), Incidence.Normal, null),
        };
        var appraisal = Appraise(new FilmCase { Film = film, Observer = StandardObserver.Cie1931, Warnings = ["of the reader"] });
        // Half is absorbed; all emitted light comes out above, less a tenth: 0.5 · 0.9 and 0.5 · 0.8 · 0.9.
        Assert.Equal(0.45, appraisal.Efficiency.BlueLeakagePhotonShare, 1e-12);
        Assert.Equal(0.45, appraisal.Efficiency.BlueLeakagePowerShare, 1e-12);
        Assert.Equal(0.36, appraisal.Efficiency.ExternalPhotonShare, 1e-12);
        Assert.Equal(0.72, appraisal.Efficiency.DownConversionShare!.Value, 1e-12);
        Assert.Equal(0.45 + (0.36 * 450 / 600), appraisal.Efficiency.EnergyShare, 1e-12);
        Assert.Equal(683 * ((0.45 * StandardObserver.Cie1931.YBar[450 - 360]) + (0.36 * 0.75 * StandardObserver.Cie1931.YBar[600 - 360])), appraisal.FilmLumensPerSourceWatt, 1e-9);
        Assert.Equal(appraisal.Power.Integral, appraisal.Efficiency.EnergyShare, 1e-12);
        Assert.Equal(Math.Log10(2), appraisal.Layers[0].OpticalDensity, 1e-12);
        Assert.Equal(1000, appraisal.Layers[0].ThicknessUm, 1e-9);
        Assert.Null(appraisal.Layers[0].CoatWeightGPerM2);
        Assert.Equal("of the reader", appraisal.Warnings[0]);
        Assert.Contains("beer-lambert", appraisal.Warnings[1], StringComparison.Ordinal);
    }

    [Fact]
    public void CoatWeight_WithDensities_IsThicknessTimesDensity()
    {
        var lot = Lot("lot", 530, 30, 2, 0.9) with { DensityGPerMl = 2 };
        var layer = Layer(0.1, [new(lot, 20)]) with { HostDensityGPerMl = 1.1 };
        // 1 % of the volume are dots: 0.99 · 1.1 + 0.02 = 1.109 g/mL, times 100 µm.
        var figures = Appraise(new FilmCase { Film = Film([layer], [lot]), Observer = StandardObserver.Cie1931 }).Layers[0];
        Assert.Equal(110.9, figures.CoatWeightGPerM2!.Value, 1e-9);
    }

    [Fact]
    public void WithoutDots_ConversionIsUndefined_AndABandWithoutLightHasNoPeak()
    {
        var appraisal = Appraise(new FilmCase { Film = Film([Layer(0.1, [])], [Lot("unused", 530, 30, 2, 0.9)]), Observer = StandardObserver.Cie1931 });
        Assert.Null(appraisal.Efficiency.DownConversionShare);
        Assert.Equal(new EmissionBand("unused", 0, null, null), appraisal.Bands[1]);
        Assert.Equal(450, appraisal.Bands[0].PeakNm!.Value, 1e-6);
        Assert.Equal(20, appraisal.Bands[0].FwhmNm!.Value, 0.02);
        // Blue is far from any black body: its temperature is not defined.
        Assert.Null(appraisal.FilmWhite.CctKelvin);
    }

    [Theory]
    [InlineData(530.0, 25)]
    [InlineData(530.3, 25)]
    [InlineData(530.5, 12)]
    public void Band_OfAGaussian_HasItsPeakAndWidth(double peakNm, double fwhmNm)
    {
        var band = EmissionBands.Of("line", Spectrum.Gaussian<PhotonPerNm>(peakNm, fwhmNm));
        Assert.Equal(peakNm, band.PeakNm!.Value, 1e-9);
        Assert.Equal(fwhmNm, band.FwhmNm!.Value, 0.03);
    }

    [Fact]
    public void Band_ThatDoesNotFallToHalf_HasNoWidth() =>
        Assert.Null(EmissionBands.Of("tail", Spectrum.Gaussian<PhotonPerNm>(365, 60)).FwhmNm);

    // Re-absorption moves a line to the red: the band after the film is not the dilute one.
    [Fact]
    public void Band_AfterReabsorption_LiesRedderThanTheDiluteLine()
    {
        var lot = Lot("lot", 530, 30, 2, 0.95, edgeNm: 525);
        double peakNm = Appraise(new FilmCase { Film = Film([Layer(0.1, [new(lot, 30)])], [lot], Cavity(0.95, 0.5)), Observer = StandardObserver.Cie1931 }).Bands[1].PeakNm!.Value;
        Assert.InRange(peakNm, 532, 545);
    }

    [Fact]
    public void NormalView_OfAModelWithoutAngles_IsRefused()
    {
        var filmCase = Mixing([[450, 20], [530, 20], [630, 20]], [.25, .36, .39]) with
        {
            Target = new(TargetPlace.Film, TargetView.Normal, 0.3127, 0.329, 1e-3, [], []),
        };
        var fault = Assert.Single(Assert.Throws<InputException>(() => Appraise(filmCase)).Faults);
        Assert.Equal("target.view", fault.File);
    }

    // A model with angles: colours are those of its radiance along the normal, lumens those of the flux.
    [Fact]
    public void NormalView_TakesColoursFromTheRadiance_AndLumensFromTheFlux()
    {
        var filmCase = Mixing([[450, 20], [530, 30], [630, 30]], [.25, .37, .38]) with { Panel = new(Band(580, 831), Band(490, 580), Band(360, 490)) };
        var output = Solve(filmCase.Film);
        var hemisphere = FilmAppraiser.Appraise(filmCase, output);
        var target = new WhiteTarget(TargetPlace.Film, TargetView.Normal, 0.3127, 0.329, 1e-3, [], []);
        var spot = FilmAppraiser.Appraise(filmCase with { Target = target }, output with { NormalRadiance = output.Unconverted.ScaledBy(0.3) });
        Assert.Equal(Colour(hemisphere.UnconvertedPower).X, spot.FilmWhite.Chromaticity.X, 1e-12);
        Assert.Equal(hemisphere.FilmLumensPerSourceWatt, spot.FilmLumensPerSourceWatt);
        Assert.Equal(hemisphere.Panel!.LumensPerSourceWatt, spot.Panel!.LumensPerSourceWatt, 1e-9);
        Assert.NotEqual(hemisphere.Panel.White, spot.Panel.White);
    }

    [Fact]
    public void NoLight_HasNoColour()
    {
        Refuses(new FilmCase { Film = TwoLots(cavity: Cavity(0.9, 1)), Observer = StandardObserver.Cie1931 }, "no light leaves above");
        var noRed = Mixing([[450, 20], [530, 20], [630, 20]], [.25, .36, .39]) with { Panel = new(Band(300, 310), Band(490, 580), Band(360, 490)) };
        Refuses(noRed, "no light passes the red filter");

        static void Refuses(FilmCase filmCase, string words) =>
            Assert.Contains(words, Assert.Throws<InputException>(() => Appraise(filmCase)).Message, StringComparison.Ordinal);
    }

    [Theory]
    [InlineData(TargetPlace.Film)]
    [InlineData(TargetPlace.Panel)]
    public void WhiteMeter_ReadsTheAppraisersWhite(TargetPlace place)
    {
        var filmCase = new FilmCase { Film = TwoLots(), Observer = StandardObserver.Cie1964, Panel = new(Band(580, 831), Band(490, 580), Band(360, 490), 0.3, 0.2, 0.1) };
        var appraisal = Appraise(filmCase);
        var expected = (place == TargetPlace.Film ? appraisal.FilmWhite : appraisal.Panel!.White).Chromaticity;
        Assert.Equal(0, new WhiteMeter(filmCase, place).Read(appraisal.Output).Chromaticity.DistanceXyTo(expected), 1e-12);
    }

    private static FilmOutput Solve(Film film) => new BeerLambertModel().Solve(film, TestContext.Current.CancellationToken);

    private static FilmAppraisal Appraise(FilmCase filmCase) => FilmAppraiser.Appraise(filmCase, Solve(filmCase.Film));

    private static Chromaticity Colour(Spectrum<WattPerNm> light) => Tristimulus.Of(light, StandardObserver.Cie1931).Chromaticity;

    private static Spectrum<Fraction> Band(int fromNm, int toNm) => Spectrum.Sampled<Fraction>(nm => nm >= fromNm && nm < toNm ? 1 : 0, "ideal filter");

    private static void AssertPrinted(string printed, double computed, string what)
    {
        double unit = Math.Pow(10, -(printed.Length - 1 - printed.IndexOf('.', StringComparison.Ordinal)));
        double expected = double.Parse(printed, CultureInfo.InvariantCulture);
        Published.AssertWithin(expected, computed, unit * (1 + 1e-9), what);
    }

    // A film that only mixes: the source shines at odd wavelengths, where the lots absorb evenly, and the lots at even ones, where nothing
    // absorbs. Loadings then set the shares and no line changes shape; a line sampled every 2 nm has the colour of the whole line.
    private static FilmCase Mixing(double[][] peakAndFwhm, double[] powerShares)
    {
        Spectrum<PhotonPerNm>[] lines =
        [
            .. peakAndFwhm.Select((line, i) => (Spectrum.Gaussian<WattPerNm>(line[0], line[1]) * EverySecond(odd: i == 0)).ToPhotons().NormalisedToUnitSum()),
        ];
        // Photons that the shares of power come to: power over the mean photon energy of the line.
        double[] photons = [.. powerShares.Select((share, i) => share / lines[i].ToPower().Integral)];
        double depth = -Math.Log(photons[0] / photons.Sum());
        double greenDepth = depth * photons[1] / (photons[1] + photons[2]);
        DotLot green = MixingLot("green", lines[1]), red = MixingLot("red", lines[2]);
        var film = Film([Layer(1, [new(green, greenDepth), new(red, depth - greenDepth)])], [green, red], Cavity(1), Incidence.Normal) with
        {
            Backlight = new(lines[0], Incidence.Normal, null),
        };
        return new() { Film = film, Observer = StandardObserver.Cie1931 };
    }

    // Depth 1 per mm at 1 mg/mL.
    private static DotLot MixingLot(string name, Spectrum<PhotonPerNm> line) =>
        Lot(name, line, nm => nm % 2 == 1 ? 1 / DotLot.PerMmFromDecadicPerCm : 0, 1);

    private static Spectrum<Fraction> EverySecond(bool odd) => Spectrum.Sampled<Fraction>(nm => (nm % 2 == 1) == odd ? 1 : 0, "every second bin");
}
