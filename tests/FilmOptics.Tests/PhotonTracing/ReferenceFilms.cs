using Colorimetry;

namespace FilmOptics.Tests.PhotonTracing;

/// <summary>Invented films whose answers were computed by independent code; their spectra are formulas on the even bins of the grid.</summary>
internal static class ReferenceFilms
{
    private const int FirstNm = 380, LastNm = 780;

    private static readonly double PerMmFromDecadicPerCm = Math.Log(10) / 10;

    /// <summary>Case a: no scattering, no returns, absorption (to 490 nm) and emission (above) do not overlap.</summary>
    public static Film CaseA => OneLayer(10, 5, hostPerMm: 0.02, scatteringPerMm: 0, Incidence.Normal, 0, 0, cutNm: 490);

    /// <summary>Case c: scattering.</summary>
    public static Film CaseC => OneLayer(4, 2, hostPerMm: 0, scatteringPerMm: 20, Incidence.Lambertian, 0, 0);

    /// <summary>Case d: scattering and returns on both sides.</summary>
    public static Film CaseD => OneLayer(2, 1, hostPerMm: 0, scatteringPerMm: 20, Incidence.Lambertian, 0.95, 0.5);

    /// <summary>Two dot layers between barriers of higher index.</summary>
    public static Film Unequal
    {
        get
        {
            var (green, red) = (Green(5, 0.94), Red(2, 0.89));
            return new()
            {
                Title = "unequal",
                Backlight = new(Line(450, 20), Incidence.Lambertian, null),
                Cavity = new(Flat<Fraction>(0.96), Flat<Fraction>(0.42), Flat<Fraction>(0.03), 0),
                Lots = [green, red],
                Layers =
                [
                    LayerOf("barrier below", 0.05, 1.6, Flat<PerMm>(0.005), 0),
                    LayerOf("red", 0.05, 1.5, GreyingHost(), 8, new DotLoading(red, 1.8)),
                    LayerOf("green", 0.05, 1.5, GreyingHost(), 20, new DotLoading(green, 1.6)),
                    LayerOf("barrier above", 0.05, 1.6, Flat<PerMm>(0.005), 0),
                ],
            };
        }
    }

    /// <summary>Two films with an air gap, an oblique source, a return by angle of arrival, and bypass.</summary>
    public static Film Gap
    {
        get
        {
            var (green, red) = (Green(5, 0.94), Red(2, 0.89));
            double[] angles = [.. Enumerable.Range(0, 181).Select(i => i / 2.0)];
            var profile = new AngleTable(angles, [.. angles.Select(a => Math.Exp(-Math.Pow((a - 50) / 25, 2)))], "profile");
            var returned = new AngleTable(angles, [.. angles.Select(a => 0.7 * Math.Exp(-Math.Pow(a / 40, 2)))], "return");
            return new()
            {
                Title = "gap",
                Backlight = new(Line(450, 20), new(IncidenceKind.Profile, profile), null),
                Cavity = new(Flat<Fraction>(0.94), Flat<Fraction>(0), Flat<Fraction>(0.02), 0.02, returned),
                Lots = [green, red],
                Layers =
                [
                    LayerOf("red", 0.06, 1.5, GreyingHost(), 10, new DotLoading(red, 1.4)),
                    LayerOf("gap", 0.02, 1, Flat<PerMm>(0), 0),
                    LayerOf("green", 0.05, 1.5, GreyingHost(), 18, new DotLoading(green, 1.5)),
                ],
            };
        }
    }

    /// <summary>A slab of one wavelength in air: no dots, what the host absorbs is lost.</summary>
    public static Film Slab(double index, double thickness, double albedo, double g, Incidence incidence) => new()
    {
        Title = "slab",
        Backlight = new(Spectrum.Sampled<PhotonPerNm>(nm => nm == 550 ? 1 : 0, "one wavelength"), incidence, null),
        Cavity = new(Flat<Fraction>(0), Flat<Fraction>(0), Flat<Fraction>(0), 0),
        Lots = [],
        Layers =
        [
            new()
            {
                Name = "slab",
                ThicknessMm = 1,
                RefractiveIndex = index,
                HostAbsorption = Flat<PerMm>(thickness * (1 - albedo)),
                Scattering = Flat<PerMm>(thickness * albedo),
                Anisotropy = Flat<MeanCosine>(g),
                Dots = [],
            },
        ],
    };

    public static Spectrum<TUnit> Flat<TUnit>(double value)
        where TUnit : struct, ISpectralUnit => Spectrum.Flat<TUnit>(value, "flat");

    private static Film OneLayer(
        double greenPerMm, double redPerMm, double hostPerMm, double scatteringPerMm, Incidence incidence, double below, double above, int? cutNm = null)
    {
        var (green, red) = (Green(greenPerMm, 0.95, cutNm), Red(redPerMm, 0.90, cutNm));
        return new()
        {
            Title = "one layer",
            Backlight = new(Line(450, 20, last: cutNm), incidence, null),
            Cavity = new(Flat<Fraction>(below), Flat<Fraction>(above), Flat<Fraction>(0), 0),
            Lots = [green, red],
            Layers =
            [
                LayerOf("dots", 0.1, 1.5, Flat<PerMm>(hostPerMm), scatteringPerMm, new DotLoading(green, 1), new DotLoading(red, 1)),
            ],
        };
    }

    private static Layer LayerOf(
        string name, double thicknessMm, double index, Spectrum<PerMm> host, double scattering, params DotLoading[] dots) => new()
        {
            Name = name,
            ThicknessMm = thicknessMm,
            RefractiveIndex = index,
            HostAbsorption = host,
            Scattering = Flat<PerMm>(scattering),
            Anisotropy = Flat<MeanCosine>(0.8),
            Dots = dots,
        };

    private static Spectrum<PerMm> GreyingHost() =>
        Spectrum.Sampled<PerMm>(nm => 0.015 + (0.04 * Math.Exp((450 - nm) / 60)), "host");

    private static DotLot Green(double perMmAt450, double yield, int? cutNm = null) =>
        Lot("green", perMmAt450, yield, Line(530, 25, first: cutNm + 2), 510, 60, 22, cutNm);

    private static DotLot Red(double perMmAt450, double yield, int? cutNm = null) =>
        Lot("red", perMmAt450, yield, Line(630, 28, first: cutNm + 2), 610, 90, 24, cutNm);

    // The edge-and-exciton shape of the reference cases, scaled to an absorption per mm at 450 nm and a loading of 1 mg/mL.
    private static DotLot Lot(
        string name, double perMmAt450, double yield, Spectrum<PhotonPerNm> emission, double edge, double slope, double width, int? cutNm)
    {
        double Shape(double nm) => (Math.Exp((edge - nm) / slope) / (1 + Math.Exp((nm - edge) / 5))) + (0.5 * Gaussian(nm, edge, width));
        return new()
        {
            Name = name,
            QuantumYieldShare = yield,
            Emission = emission,
            Absorbance = Spectrum.Sampled<AbsorbancePerCm>(
                nm => nm > cutNm ? 0 : perMmAt450 * Shape(nm) / Shape(450) / PerMmFromDecadicPerCm, name),
        };
    }

    private static Spectrum<PhotonPerNm> Line(double peak, double fwhm, int? first = null, int? last = null) =>
        Spectrum.Sampled<PhotonPerNm>(
            nm => nm % 2 == 0 && nm >= (first ?? FirstNm) && nm <= (last ?? LastNm) ? Gaussian(nm, peak, fwhm) : 0,
            $"line at {peak} nm").NormalisedToUnitSum();

    private static double Gaussian(double nm, double peak, double fwhm) => Math.Exp(-4 * Math.Log(2) * Math.Pow((nm - peak) / fwhm, 2));
}
