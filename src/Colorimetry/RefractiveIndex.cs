namespace Colorimetry;

/// <summary>A refractive index, or its absorbing part, against wavelength.</summary>
public readonly struct RefractiveIndex : ISpectralUnit
{
    /// <inheritdoc/>
    public static string Symbol => "n";
}
