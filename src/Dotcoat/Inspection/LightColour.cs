using Colorimetry;

namespace Dotcoat.Inspection;

/// <summary>The colour of a light.</summary>
/// <param name="Observer">The observer it was computed with.</param>
/// <param name="Tristimulus">X, Y, Z per watt of the light, k = 683 lm/W: Y is its luminous efficacy.</param>
/// <param name="Chromaticity">Its chromaticity.</param>
/// <param name="CctKelvin">Correlated colour temperature, K; null where it is not defined.</param>
/// <param name="Duv">Distance from the Planckian locus; null where CCT is.</param>
/// <param name="Dominant">Dominant or complementary wavelength and purity against the equal-energy white; null for that white.</param>
internal sealed record LightColour(
    string Observer, Tristimulus Tristimulus, Chromaticity Chromaticity, double? CctKelvin, double? Duv, DominantWavelength? Dominant)
{
    // The white that dominant wavelengths of light sources are given against: E, as CIE 127 does for LEDs (from memory).
    private static readonly Chromaticity EqualEnergy = new(1.0 / 3, 1.0 / 3);

    /// <summary>The colour of a light for the CIE 1931 observer; null where there is no visible light.</summary>
    public static LightColour? Of(Spectrum<WattPerNm> light)
    {
        var observer = StandardObserver.Cie1931;
        if (!(light.Integral > 0))
            return null;
        // A file of light is relative: only per watt do its tristimulus values mean anything.
        var tristimulus = Tristimulus.Of(light.NormalisedToUnitSum(), observer);
        if (!tristimulus.HasColour)
            return null;
        var chromaticity = tristimulus.Chromaticity;
        var cct = CorrelatedColourTemperature.Of(chromaticity);
        return new(observer.Name, tristimulus, chromaticity, cct?.Kelvin, cct?.Duv, DominantWavelength.Of(chromaticity, EqualEnergy));
    }
}
