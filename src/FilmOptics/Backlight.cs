using Colorimetry;

namespace FilmOptics;

/// <summary>The light that reaches the film from below.</summary>
/// <param name="Photons">Spectrum, normalised: photons per source photon in each 1 nm bin, sum 1.</param>
/// <param name="Incidence">How it is spread over angles in air.</param>
/// <param name="RadiantFluxW">Optical power over the whole sheet, W; null where unknown.</param>
public sealed record Backlight(Spectrum<PhotonPerNm> Photons, Incidence Incidence, double? RadiantFluxW);

/// <summary>Kinds of incidence.</summary>
public enum IncidenceKind
{
    /// <summary>Equal radiance from everywhere below.</summary>
    Lambertian,

    /// <summary>A collimated beam along the normal.</summary>
    Normal,

    /// <summary>A measured radiance against polar angle, even in azimuth.</summary>
    Profile,
}

/// <summary>Angular spread of the source light in air.</summary>
/// <param name="Kind">Which kind.</param>
/// <param name="RadianceByAngle">Relative radiance against polar angle in air; set for <see cref="IncidenceKind.Profile"/> only.</param>
public sealed record Incidence(IncidenceKind Kind, AngleTable? RadianceByAngle = null)
{
    /// <summary>Equal radiance from everywhere below.</summary>
    public static Incidence Lambertian { get; } = new(IncidenceKind.Lambertian);

    /// <summary>A collimated beam along the normal.</summary>
    public static Incidence Normal { get; } = new(IncidenceKind.Normal);
}

/// <summary>What the film sees outside its faces: Lambertian reflectors in air.</summary>
/// <param name="BelowReflectance">Light guide and reflector sheet, 0…1 at each wavelength.</param>
/// <param name="AboveReflectance">Prism films, reflective polariser: share sent back down, 0…1.</param>
/// <param name="AboveAbsorptance">Share those absorb, 0…1; reflectance + absorptance ≤ 1.</param>
/// <param name="BypassShare">Share of the source that reaches the sheets above without meeting the film, 0…1.</param>
/// <param name="AboveReflectanceByAngle">
/// Where set, the return above depends on the air angle of arrival, not on wavelength, and
/// <paramref name="AboveReflectance"/> is not used.
/// </param>
public sealed record Cavity(
    Spectrum<Fraction> BelowReflectance,
    Spectrum<Fraction> AboveReflectance,
    Spectrum<Fraction> AboveAbsorptance,
    double BypassShare,
    AngleTable? AboveReflectanceByAngle = null);
