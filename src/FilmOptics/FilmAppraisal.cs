using Colorimetry;

namespace FilmOptics;

/// <summary>Everything a film is judged by, computed from one <see cref="FilmOutput"/>.</summary>
/// <remarks>Power and lumens are per source watt, photons per source photon; the light is that leaving above, before the panel.</remarks>
public sealed record FilmAppraisal
{
    /// <summary>The model's result.</summary>
    public required FilmOutput Output { get; init; }

    /// <summary>All light leaving above, W/nm per source watt.</summary>
    public required Spectrum<WattPerNm> Power { get; init; }

    /// <summary>Its unconverted part, W/nm per source watt.</summary>
    public required Spectrum<WattPerNm> UnconvertedPower { get; init; }

    /// <summary>Its converted parts by last emitting lot, in the order of <see cref="Film.Lots"/>, W/nm per source watt.</summary>
    public required IReadOnlyList<Spectrum<WattPerNm>> ConvertedPowerByLot { get; init; }

    /// <summary>White of the film's light.</summary>
    public required WhitePoint FilmWhite { get; init; }

    /// <summary>Lumens leaving above per source watt.</summary>
    public required double FilmLumensPerSourceWatt { get; init; }

    /// <summary>The panel's colours, or null without a panel.</summary>
    public PanelColours? Panel { get; init; }

    /// <summary>Comparison with standards, or null without a panel.</summary>
    public IReadOnlyList<GamutComparison>? Gamut { get; init; }

    /// <summary>Light by last emitter: the source first, then each lot.</summary>
    public required IReadOnlyList<EmissionBand> Bands { get; init; }

    /// <summary>What a coater can check, per layer.</summary>
    public required IReadOnlyList<LayerFigures> Layers { get; init; }

    /// <summary>Efficiencies by their definitions.</summary>
    public required FilmEfficiency Efficiency { get; init; }

    /// <summary>What a haze meter would read on the bare film, where it was asked for.</summary>
    public HazeReading? Haze { get; init; }

    /// <summary>Light beside a lit square zone of the backlight, where it was asked for.</summary>
    public ZoneProfile? Zone { get; init; }

    /// <summary>How far light strays per colour, where a zone was asked for.</summary>
    public IReadOnlyList<ColourSpread>? Spread { get; init; }

    /// <summary>Light near the cut edge of the sheet, where it was asked for.</summary>
    public SheetEdge? Edge { get; init; }

    /// <summary>Warnings of the reader, the model and the appraisal, in that order.</summary>
    public required IReadOnlyList<string> Warnings { get; init; }
}

/// <summary>A white point.</summary>
/// <param name="Chromaticity">Its chromaticity.</param>
/// <param name="CctKelvin">Correlated colour temperature, K; null where it is not defined.</param>
/// <param name="Duv">Signed distance from the Planckian locus in CIE 1960 uv, above is positive; null where CCT is.</param>
public sealed record WhitePoint(Chromaticity Chromaticity, double? CctKelvin, double? Duv);

/// <summary>Colours behind the filters.</summary>
/// <param name="White">White: the sum of the primaries.</param>
/// <param name="Red">Red primary.</param>
/// <param name="Green">Green primary.</param>
/// <param name="Blue">Blue primary.</param>
/// <param name="LumensPerSourceWatt">Lumens through the panel per source watt.</param>
public sealed record PanelColours(
    WhitePoint White, Chromaticity Red, Chromaticity Green, Chromaticity Blue, double LumensPerSourceWatt);

/// <summary>A panel against a standard. Coverage and area ratio are different numbers: see DEVELOPERS.md.</summary>
/// <param name="Name">The standard.</param>
/// <param name="CoverageXy">Area of panel ∩ standard over area of the standard, in xy.</param>
/// <param name="CoverageUv">The same in u′v′.</param>
/// <param name="AreaRatioXy">Area of the panel over area of the standard, in xy; may exceed 1.</param>
/// <param name="AreaRatioUv">The same in u′v′.</param>
public sealed record GamutComparison(
    string Name, double CoverageXy, double CoverageUv, double AreaRatioXy, double AreaRatioUv);

/// <summary>Light leaving above by last emitter, after re-absorption.</summary>
/// <param name="Name">"source" or the lot's name.</param>
/// <param name="Photons">Photons per source photon.</param>
/// <param name="PeakNm">Peak of the photon spectrum, nm; null without light.</param>
/// <param name="FwhmNm">Full width at half maximum, nm; null where the line does not fall to half on both sides.</param>
public sealed record EmissionBand(string Name, double Photons, double? PeakNm, double? FwhmNm);

/// <summary>What a coater can check on a layer.</summary>
/// <param name="Name">The layer.</param>
/// <param name="ThicknessUm">Cured thickness, µm.</param>
/// <param name="CoatWeightGPerM2">Coat weight, g/m²; null where a density is unknown.</param>
/// <param name="OpticalDensity">Decadic, dots and host, along the normal at the source's peak.</param>
public sealed record LayerFigures(string Name, double ThicknessUm, double? CoatWeightGPerM2, double OpticalDensity);

/// <summary>Efficiencies; definitions in README.md.</summary>
/// <param name="BlueLeakagePhotonShare">Source photons that leave above unconverted.</param>
/// <param name="BlueLeakagePowerShare">Source power that leaves above unconverted.</param>
/// <param name="ExternalPhotonShare">Converted photons leaving above per source photon.</param>
/// <param name="DownConversionShare">Converted photons leaving above per source photon absorbed by dots; null where none is.</param>
/// <param name="EnergyShare">Power leaving above per source power.</param>
public sealed record FilmEfficiency(
    double BlueLeakagePhotonShare,
    double BlueLeakagePowerShare,
    double ExternalPhotonShare,
    double? DownConversionShare,
    double EnergyShare);
