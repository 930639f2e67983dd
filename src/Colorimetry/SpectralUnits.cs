namespace Colorimetry;

/// <summary>What the samples of a spectrum measure. Units are types, so that light and filter cannot be added.</summary>
public interface ISpectralUnit
{
    /// <summary>Symbol for axes, tables and messages.</summary>
    static abstract string Symbol { get; }
}

/// <summary>A unit of light: amounts that add up.</summary>
public interface ILightUnit : ISpectralUnit;

/// <summary>Power per nanometre: W/nm, relative or per source watt as the source text says.</summary>
public readonly struct WattPerNm : ILightUnit
{
    /// <inheritdoc/>
    public static string Symbol => "W/nm";
}

/// <summary>Photons per nanometre, relative or per source photon. On the 1 nm grid a sample is also the photons of its bin.</summary>
public readonly struct PhotonPerNm : ILightUnit
{
    /// <inheritdoc/>
    public static string Symbol => "photons/nm";
}

/// <summary>A share in 0…1: transmittance, reflectance, absorptance.</summary>
public readonly struct Fraction : ISpectralUnit
{
    /// <inheritdoc/>
    public static string Symbol => "1";
}

/// <summary>A Napierian (base e) absorption or scattering coefficient, 1/mm.</summary>
public readonly struct PerMm : ISpectralUnit
{
    /// <inheritdoc/>
    public static string Symbol => "1/mm";
}

/// <summary>Decadic absorbance over a 1 cm path at 1 mg/mL.</summary>
public readonly struct AbsorbancePerCm : ISpectralUnit
{
    /// <inheritdoc/>
    public static string Symbol => "1/cm at 1 mg/mL";
}

/// <summary>Mean cosine of the scattering angle (Henyey–Greenstein g), −1 to 1.</summary>
public readonly struct MeanCosine : ISpectralUnit
{
    /// <inheritdoc/>
    public static string Symbol => "g";
}
