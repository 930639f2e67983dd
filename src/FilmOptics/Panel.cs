using Colorimetry;

namespace FilmOptics;

/// <summary>Colour filters of the panel with the area that each colour has of a pixel.</summary>
/// <param name="Red">Transmittance of the red filter, 0…1.</param>
/// <param name="Green">Transmittance of the green filter, 0…1.</param>
/// <param name="Blue">Transmittance of the blue filter, 0…1.</param>
/// <param name="RedAreaShare">Share of the pixel's area, 0…1; the three sum to at most 1 (aperture).</param>
/// <param name="GreenAreaShare">Share of the pixel's area.</param>
/// <param name="BlueAreaShare">Share of the pixel's area.</param>
public sealed record Panel(
    Spectrum<Fraction> Red,
    Spectrum<Fraction> Green,
    Spectrum<Fraction> Blue,
    double RedAreaShare = 1.0 / 3,
    double GreenAreaShare = 1.0 / 3,
    double BlueAreaShare = 1.0 / 3);
