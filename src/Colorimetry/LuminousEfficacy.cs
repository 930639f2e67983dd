namespace Colorimetry;

/// <summary>Luminous efficacy of radiation: lumens per optical watt of a light.</summary>
/// <remarks>Source: ISO 23539:2023 with K_m = 683 lm/W; V(λ) is ȳ of the CIE 1931 observer, from 360 to 830 nm.</remarks>
public static class LuminousEfficacy
{
    /// <summary>Lumens per watt; null where there is no light.</summary>
    public static double? LumensPerWatt(Spectrum<WattPerNm> light)
    {
        ArgumentNullException.ThrowIfNull(light);
        double watts = light.Integral;
        return watts > 0 ? Tristimulus.Of(light, StandardObserver.Cie1931).Y / watts : null;
    }
}
