namespace FilmOptics;

/// <summary>What a haze meter and a sphere would read on a bare film, light falling along the normal.</summary>
/// <remarks>
/// Definitions as in the open standards ASTM D1003, ISO 13468 and ISO 14782 (from memory): haze is the share of the transmitted light that
/// is deflected by more than 2.5 degrees. An ideal instrument is meant: a perfectly parallel beam, no light lost at the sample's rim.
/// </remarks>
/// <param name="WavelengthNm">Wavelength of the light, nm.</param>
/// <param name="TotalTransmittanceShare">All light that passes the film, 0…1.</param>
/// <param name="HazeShare">Share of it that is deflected by more than 2.5 degrees, 0…1.</param>
/// <param name="TotalTransmittanceErrorShare">Standard error of the transmittance.</param>
/// <param name="HazeErrorShare">Standard error of the haze.</param>
public sealed record HazeReading(
    int WavelengthNm,
    double TotalTransmittanceShare,
    double HazeShare,
    double TotalTransmittanceErrorShare,
    double HazeErrorShare);

/// <summary>Computes what a haze meter would read on a film.</summary>
public interface IHazeMeter
{
    /// <summary>Total transmittance and haze of the film without backlight and sheets.</summary>
    /// <param name="film">Its layers count; backlight and cavity do not.</param>
    /// <param name="wavelengthNm">A wavelength on the grid at which no dot absorbs, nm.</param>
    /// <param name="cancellationToken">Stops the work.</param>
    /// <exception cref="Colorimetry.InputException">Dots absorb at the wavelength, or it is off the grid.</exception>
    HazeReading Read(Film film, int wavelengthNm, CancellationToken cancellationToken = default);
}
