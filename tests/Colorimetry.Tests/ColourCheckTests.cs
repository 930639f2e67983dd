using System.Globalization;

namespace Colorimetry.Tests;

/// <summary>Figures of standards and of independent code, one row each, in Data/colour-checks.csv and Data/ciede2000.csv.</summary>
public sealed class ColourCheckTests
{
    private static readonly Chromaticity D65 = new(0.3127, 0.3290);

    public static TheoryData<string, string, string, string, string> Rows()
    {
        var rows = new TheoryData<string, string, string, string, string>();
        foreach (string[] row in DataRows.Read("colour-checks.csv"))
            rows.Add(row[0], row[1], row[2], row[3], row[4]);
        return rows;
    }

    public static TheoryData<double, double, double, double, double, double, string> Pairs()
    {
        var rows = new TheoryData<double, double, double, double, double, double, string>();
        foreach (string[] row in DataRows.Read("ciede2000.csv"))
            rows.Add(N(row[0]), N(row[1]), N(row[2]), N(row[3]), N(row[4]), N(row[5]), row[6]);
        return rows;
    }

    [Theory]
    [MemberData(nameof(Rows))]
    public void Figure_MatchesItsSource(string check, string arguments, string expected, string tolerance, string source)
    {
        string[] a = arguments.Split(';');
        double computed = check switch
        {
            "primary" => Coordinate(Primary(ColourGamut.Named(a[0]), a[1]), a[2]),
            "white" => Coordinate(ColourGamut.Named(a[0]).White, a[1]),
            "uv" => a[2] == "u" ? new Chromaticity(N(a[0]), N(a[1])).UPrime : new Chromaticity(N(a[0]), N(a[1])).VPrime,
            "luma" => Luma(ColourGamut.Named(a[0]), a[1]),
            "area" => Area(ColourGamut.Named(a[0]), Diagram(a[1])),
            "area_ratio" => Ratio(ColourGamut.Named(a[0]), ColourGamut.Named(a[1]), Diagram(a[2])),
            "coverage" => Coverage(ColourGamut.Named(a[0]), ColourGamut.Named(a[1]), Diagram(a[2])),
            "single_wavelength" => Coordinate(SpectralLocus.At(int.Parse(a[0], CultureInfo.InvariantCulture)), a[1]),
            "planck" => Coordinate(PlanckianLocus.At(N(a[0])), a[1]),
            "cct" => CorrelatedColourTemperature.Of(new(N(a[0]), N(a[1])))!.Value.Kelvin,
            "duv" => CorrelatedColourTemperature.Of(new(N(a[0]), N(a[1])))!.Value.Duv,
            "cct_inverse" => Coordinate(CorrelatedColourTemperature.ChromaticityAt(N(a[0]), N(a[1])), a[2]),
            "dominant" => Dominant(a, complementary: false).WavelengthNm,
            "complementary" => Dominant(a, complementary: true).WavelengthNm,
            "purity" => DominantWavelength.Of(new(N(a[0]), N(a[1])), D65)!.Value.ExcitationPurityShare,
            "lab" => Part(Cielab.From(new(N(a[0]), N(a[1]), N(a[2])), Tristimulus.From(D65, 1)), a[3]),
            "lab_rgb" => Part(Cielab.From(Mixed(N(a[0]), N(a[1]), N(a[2])), Tristimulus.From(D65, 1)), a[3]),
            "luv" => Part(Cieluv.From(new(N(a[0]), N(a[1]), N(a[2])), Tristimulus.From(D65, 1)), a[3]),
            "efficacy_single_wavelength" => LuminousEfficacy.LumensPerWatt(Line(int.Parse(a[0], CultureInfo.InvariantCulture)))!.Value,
            "efficacy_illuminant" => LuminousEfficacy.LumensPerWatt(Illuminant(a[0]))!.Value,
            "photon_energy_ev" => PhysicalConstants.PhotonEnergyJoule(N(a[0])) / PhysicalConstants.ElementaryChargeCoulomb,
            "photons_per_joule" => 1 / PhysicalConstants.PhotonEnergyJoule(N(a[0])),
            "gaussian" => Gaussian(N(a[0]), N(a[1]), a[2], a[3]),
            _ => throw new ArgumentException(check, nameof(check)),
        };
        // A hair for rows whose tolerance is 0: the digits of a standard are kept exactly.
        Published.AssertWithin(N(expected), computed, N(tolerance) + 1e-12, $"{check} {arguments} ({source})");
    }

    [Theory]
    [MemberData(nameof(Pairs))]
    public void De2000_MatchesPublishedPair(double l1, double a1, double b1, double l2, double a2, double b2, string printed)
    {
        Published.AssertMatches(printed, ColourDifference.De2000(new(l1, a1, b1), new(l2, a2, b2)), $"{l1}, {a1}, {b1} against {l2}, {a2}, {b2}");
        Published.AssertMatches(printed, ColourDifference.De2000(new(l2, a2, b2), new(l1, a1, b1)), "the same the other way round");
    }

    [Fact]
    public void Checks_AreAtLeastAsManyAsPromised() => Assert.True(DataRows.Read("colour-checks.csv").Count >= 150);

    private static double Gaussian(double peakNm, double fwhmNm, string unit, string quantity)
    {
        var light = unit == "power" ? Spectrum.Gaussian<WattPerNm>(peakNm, fwhmNm) : Spectrum.Gaussian<PhotonPerNm>(peakNm, fwhmNm).ToPower();
        var colour = Tristimulus.Of(light, StandardObserver.Cie1931).Chromaticity;
        return quantity switch
        {
            "LER" => LuminousEfficacy.LumensPerWatt(light)!.Value,
            "dominant_wl" => DominantWavelength.Of(colour, D65)!.Value.WavelengthNm,
            _ => Coordinate(colour, quantity),
        };
    }

    private static DominantWavelength Dominant(string[] a, bool complementary)
    {
        var found = DominantWavelength.Of(new(N(a[0]), N(a[1])), D65)!.Value;
        Assert.Equal(complementary, found.IsComplementary);
        return found;
    }

    private static Spectrum<WattPerNm> Line(int atNm) => Spectrum.Sampled<WattPerNm>(nm => nm == atNm ? 1 : 0, $"{atNm} nm");

    private static Spectrum<WattPerNm> Illuminant(string name) => name switch
    {
        "A" => StandardIlluminant.A,
        "D50" => StandardIlluminant.D50,
        "D65" => StandardIlluminant.D65,
        _ => StandardIlluminant.E,
    };

    private static Tristimulus Mixed(double red, double green, double blue)
    {
        var (r, g, b) = ColourGamut.Named("BT.709").PrimariesAtWhite();
        return new((red * r.X) + (green * g.X) + (blue * b.X), (red * r.Y) + (green * g.Y) + (blue * b.Y), (red * r.Z) + (green * g.Z) + (blue * b.Z));
    }

    private static double Luma(ColourGamut gamut, string channel)
    {
        var (red, green, blue) = gamut.PrimariesAtWhite();
        return channel switch { "R" => red.Y, "G" => green.Y, _ => blue.Y };
    }

    private static double Area(ColourGamut g, ChromaticityDiagram diagram) => GamutCoverage.Area(g.Red, g.Green, g.Blue, diagram);

    private static double Ratio(ColourGamut g, ColourGamut standard, ChromaticityDiagram diagram) =>
        GamutCoverage.AreaRatio(g.Red, g.Green, g.Blue, standard, diagram);

    private static double Coverage(ColourGamut g, ColourGamut standard, ChromaticityDiagram diagram) =>
        GamutCoverage.Coverage(g.Red, g.Green, g.Blue, standard, diagram);

    private static ChromaticityDiagram Diagram(string name) => name == "xy" ? ChromaticityDiagram.Xy1931 : ChromaticityDiagram.UvPrime1976;

    private static Chromaticity Primary(ColourGamut gamut, string channel) =>
        channel switch { "R" => gamut.Red, "G" => gamut.Green, _ => gamut.Blue };

    private static double Coordinate(Chromaticity c, string name) =>
        name switch { "x" => c.X, "y" => c.Y, "u" => c.UPrime, "v" => c.V1960, _ => throw new ArgumentException(name, nameof(name)) };

    private static double Part(Cielab lab, string name) => name switch { "L" => lab.L, "a" => lab.A, _ => lab.B };

    private static double Part(Cieluv luv, string name) => name switch { "L" => luv.L, "u" => luv.U, _ => luv.V };

    private static double N(string text) => double.Parse(text, CultureInfo.InvariantCulture);
}
