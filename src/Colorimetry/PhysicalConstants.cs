namespace Colorimetry;

/// <summary>SI constants, exact since 2019 (source: SI Brochure, 9th edition), and the photometric constant.</summary>
public static class PhysicalConstants
{
    /// <summary>Planck constant h, J s.</summary>
    public const double PlanckJouleSecond = 6.62607015e-34;

    /// <summary>Speed of light in vacuum c, m/s.</summary>
    public const double LightSpeedMetrePerSecond = 299792458;

    /// <summary>Boltzmann constant k, J/K.</summary>
    public const double BoltzmannJoulePerKelvin = 1.380649e-23;

    /// <summary>Elementary charge e, C.</summary>
    public const double ElementaryChargeCoulomb = 1.602176634e-19;

    /// <summary>Maximum luminous efficacy K_m as CIE tables use it, lm/W.</summary>
    public const double MaximumLuminousEfficacyLumenPerWatt = 683;

    /// <summary>Energy of one photon, J.</summary>
    /// <param name="wavelengthNm">Wavelength, nm, above 0.</param>
    public static double PhotonEnergyJoule(double wavelengthNm) =>
        PlanckJouleSecond * LightSpeedMetrePerSecond / (wavelengthNm * 1e-9);
}
