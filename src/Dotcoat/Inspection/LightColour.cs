using Colorimetry;

namespace Dotcoat.Inspection;

/// <summary>The colour of a light.</summary>
/// <param name="Observer">The observer it was computed with.</param>
/// <param name="Tristimulus">X, Y, Z with k = 683 lm/W, of the file's own numbers as W/nm.</param>
/// <param name="Chromaticity">Its chromaticity.</param>
/// <param name="CctKelvin">Correlated colour temperature, K; null where it is not defined.</param>
/// <param name="Duv">Distance from the Planckian locus; null where CCT is.</param>
/// <param name="LumensPerWatt">Luminous efficacy of radiation, lm/W.</param>
internal sealed record LightColour(
    string Observer, Tristimulus Tristimulus, Chromaticity Chromaticity, double? CctKelvin, double? Duv, double LumensPerWatt)
{
    /// <summary>The colour of a light for the CIE 1931 observer; null where there is no visible light.</summary>
    public static LightColour? Of(Spectrum<WattPerNm> light)
    {
        var observer = StandardObserver.Cie1931;
        var tristimulus = Tristimulus.Of(light, observer);
        if (!tristimulus.HasColour)
            return null;
        var chromaticity = tristimulus.Chromaticity;
        var cct = CorrelatedColourTemperature.Of(chromaticity);
        return new(observer.Name, tristimulus, chromaticity, cct?.Kelvin, cct?.Duv, tristimulus.Y / light.Integral);
    }
}
