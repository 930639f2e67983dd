using Colorimetry;
using CsCheck;

namespace FilmOptics.Tests;

/// <summary>Invented films for tests of any model: a small builder, and random films of every kind that a film file can describe.</summary>
internal static class FilmGenerators
{
    /// <summary>Random lots: peaks 500–660 nm, yields 0–1 with both ends, absorption that reaches into the emission.</summary>
    public static Gen<DotLot> Lots { get; } =
        from peakNm in Gen.Double[500, 660]
        from fwhmNm in Gen.Double[15, 50]
        from absorbanceAt450 in Gen.Double[0.2, 5]
        from yield in Gen.OneOf(Gen.Const(0.0), Gen.Const(1.0), Gen.Double[0, 1], Gen.Double[0.8, 1])
        select Lot("lot", peakNm, fwhmNm, absorbanceAt450, yield);

    /// <summary>Random cavities: flat or spectral returns with both ends, absorption above, bypass; some with a return by angle.</summary>
    public static Gen<Cavity> Cavities { get; } =
        from below in Shares
        from above in Shares
        from absorbed in Shares
        from slope in Gen.Double[0, 1]
        from bypass in Gen.OneOf(Gen.Const(0.0), Gen.Const(1.0), Gen.Double[0, 0.3])
        from isByAngle in Gen.Int[0, 4]
        select new Cavity(
            Sloped<Fraction>(below, slope),
            Sloped<Fraction>(above, 1 - slope),
            Spectrum.Flat<Fraction>((1 - above) * absorbed, "above"),
            bypass,
            isByAngle == 0 ? new AngleTable([0, 30, 60, 90], [above, above * 0.8, above * 0.3, 0], "return") : null);

    /// <summary>Random incidences.</summary>
    public static Gen<Incidence> Incidences { get; } = Gen.OneOf(
        Gen.Const(Incidence.Lambertian),
        Gen.Const(Incidence.Normal),
        Gen.Double[1, 80].Select(deg => new Incidence(
            IncidenceKind.Profile, new AngleTable([0, deg, deg + 5, 90], [0.2, 0.2, 1, 0.1], "profile"))));

    /// <summary>Random films: one to four layers (some of them air gaps or empty), none to four lots.</summary>
    public static Gen<Film> Films { get; } =
        from lots in Lots.Array[0, 4]
        from cavity in Cavities
        from incidence in Incidences
        from peakNm in Gen.Double[430, 480]
        from layers in Layers(lots).Array[1, 4]
        select Film(
            [.. layers.Select((layer, i) => layer with { Name = $"layer {i + 1}", Dots = [.. layer.Dots.Select(d => d with { Lot = Named(lots)[IndexOf(lots, d.Lot)] })] })],
            Named(lots), cavity, incidence, peakNm);

    private static Gen<double> Shares => Gen.OneOf(Gen.Const(0.0), Gen.Const(1.0), Gen.Double[0, 1], Gen.Double[0.9, 1]);

    /// <summary>A lot with a Gaussian line (in photons) and an absorbance that rises to the blue and ends just above its line.</summary>
    /// <param name="name">Name.</param>
    /// <param name="peakNm">Peak of the emission.</param>
    /// <param name="fwhmNm">Its FWHM.</param>
    /// <param name="absorbanceAt450">Decadic absorbance per cm at 1 mg/mL and 450 nm.</param>
    /// <param name="yieldShare">Quantum yield.</param>
    /// <param name="edgeNm">Where the absorbance ends; 15 nm below the peak otherwise.</param>
    public static DotLot Lot(string name, double peakNm, double fwhmNm, double absorbanceAt450, double yieldShare, double? edgeNm = null)
    {
        double edge = edgeNm ?? (peakNm - 15);
        return new()
        {
            Name = name,
            QuantumYieldShare = yieldShare,
            Emission = Spectrum.Gaussian<PhotonPerNm>(peakNm, fwhmNm).NormalisedToUnitSum(),
            Absorbance = Spectrum.Sampled<AbsorbancePerCm>(nm => absorbanceAt450 * Shape(nm) / Shape(450), $"{name} absorbance"),
        };

        double Shape(double nm) => Math.Exp((450 - nm) / 70) / (1 + Math.Exp((nm - edge) / 6));
    }

    /// <summary>A lot of any spectra.</summary>
    public static DotLot Lot(string name, Spectrum<PhotonPerNm> emission, Func<double, double> absorbanceAtNm, double yieldShare) => new()
    {
        Name = name,
        QuantumYieldShare = yieldShare,
        Emission = emission.NormalisedToUnitSum(),
        Absorbance = Spectrum.Sampled<AbsorbancePerCm>(absorbanceAtNm, $"{name} absorbance"),
    };

    /// <summary>A layer, index 1.5 and clear if not said otherwise.</summary>
    public static Layer Layer(double thicknessMm, IReadOnlyList<DotLoading> dots, double index = 1.5, double hostPerMm = 0, double scatteringPerMm = 0) => new()
    {
        Name = "layer",
        ThicknessMm = thicknessMm,
        RefractiveIndex = index,
        HostAbsorption = Spectrum.Flat<PerMm>(hostPerMm, "host"),
        Scattering = Spectrum.Flat<PerMm>(scatteringPerMm, "scattering"),
        Anisotropy = Spectrum.Flat<MeanCosine>(0.8, "anisotropy"),
        Dots = dots,
    };

    /// <summary>Lambertian returns, the same at every wavelength.</summary>
    public static Cavity Cavity(double below = 0, double above = 0, double absorbedAbove = 0, double bypass = 0) => new(
        Spectrum.Flat<Fraction>(below, "below"), Spectrum.Flat<Fraction>(above, "above"), Spectrum.Flat<Fraction>(absorbedAbove, "absorbed above"), bypass);

    /// <summary>A film over a Gaussian LED, 20 nm wide (in photons).</summary>
    public static Film Film(
        IReadOnlyList<Layer> layers, IReadOnlyList<DotLot> lots, Cavity? cavity = null, Incidence? incidence = null, double ledPeakNm = 450) => new()
    {
        Title = "invented",
        Backlight = new(Spectrum.Gaussian<PhotonPerNm>(ledPeakNm, 20).NormalisedToUnitSum(), incidence ?? Incidence.Lambertian, null),
        Cavity = cavity ?? Cavity(),
        Layers = layers,
        Lots = lots,
    };

    /// <summary>An ordinary film: a green and a red lot in one layer of 0.1 mm, with a recycling cavity.</summary>
    public static Film TwoLots(double greenMgPerMl = 6, double redMgPerMl = 2, Cavity? cavity = null)
    {
        DotLot green = Lot("green", 530, 28, 2.2, 0.92), red = Lot("red", 630, 30, 3.2, 0.9);
        return Film(
            [Layer(0.1, [new(green, greenMgPerMl), new(red, redMgPerMl)], hostPerMm: 0.002, scatteringPerMm: 12)],
            [green, red],
            cavity ?? Cavity(0.95, 0.55, 0.02));
    }

    private static Gen<Layer> Layers(DotLot[] lots) =>
        from thicknessMm in Gen.Double[0.005, 0.3]
        from index in Gen.OneOf(Gen.Const(1.5), Gen.Double[1, 1.8])
        from host in Gen.OneOf(Gen.Const(0.0), Gen.Double[0, 0.05])
        from scattering in Gen.OneOf(Gen.Const(0.0), Gen.Double[0, 40])
        from loadings in Gen.OneOf(Gen.Const(0.0), Gen.Double[0, 20]).Array[lots.Length]
        select Layer(thicknessMm, index < 1.02 ? [] : [.. lots.Zip(loadings, (lot, mgPerMl) => new DotLoading(lot, mgPerMl))], index, host, scattering);

    private static DotLot[] Named(DotLot[] lots) => [.. lots.Select((lot, i) => lot with { Name = $"lot {i + 1}" })];

    private static int IndexOf(DotLot[] lots, DotLot lot) => Array.FindIndex(lots, other => ReferenceEquals(other, lot));

    // A return that changes over the spectrum: the share at 360 nm, less by up to a tenth at 830 nm.
    private static Spectrum<TUnit> Sloped<TUnit>(double share, double slope)
        where TUnit : struct, ISpectralUnit =>
        Spectrum.Sampled<TUnit>(nm => share * (1 - (slope < 0.5 ? 0 : 0.1 * slope * (nm - 360) / 470)), "return");
}
