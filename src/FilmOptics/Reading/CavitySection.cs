using System.Globalization;
using Colorimetry;

namespace FilmOptics.Reading;

/// <summary>Reads `cavity`; all of it is optional.</summary>
internal static class CavitySection
{
    public static Cavity? Read(Section? section, SpectrumLoader loader)
    {
        if (section is null)
        {
            var none = Spectrum.Flat<Fraction>(0, "no cavity");
            return new(none, none, none, 0);
        }

        var below = loader.NumberOrSpectrum<Fraction>(section, "below_reflectance", NumberRule.Share, SpectrumKind.Reflectance);
        var value = section.Find("above_reflectance");
        string key = section.PathOf("above_reflectance");
        bool isByAngle = loader.IsByAngle(value, key);
        var byAngle = isByAngle ? loader.ByAngle(value!, key, SpectrumKind.Reflectance, "reflectance") : null;
        var above = isByAngle
            ? Spectrum.Flat<Fraction>(0, "by angle")
            : loader.NumberOrSpectrum<Fraction>(section, "above_reflectance", NumberRule.Share, SpectrumKind.Reflectance);
        var absorptance = loader.NumberOrSpectrum<Fraction>(section, "above_absorptance", NumberRule.Share, SpectrumKind.Absorptance);
        double bypassShare = section.Number("bypass_share", NumberRule.Share, 0);
        section.Close();
        if (below is null || above is null || absorptance is null)
            return null;
        RequireEnergyIsKept(section, above, absorptance, byAngle);
        return new(below, above, absorptance, bypassShare, byAngle);
    }

    private static void RequireEnergyIsKept(Section section, Spectrum<Fraction> above, Spectrum<Fraction> absorptance, AngleTable? byAngle)
    {
        const double rounding = 1e-12;
        string key = section.Has("above_absorptance") ? "above_absorptance" : "above_reflectance";
        if (byAngle is not null)
        {
            for (int i = 0; i < byAngle.Values.Length; i++)
            {
                if (byAngle.Values[i] + absorptance.Peak <= 1 + rounding)
                    continue;
                section.Fault(key,
                    $"Above, reflectance {Shown.Number(byAngle.Values[i])} at {Shown.Number(byAngle.AnglesDeg[i])} degrees "
                    + $"and absorptance {Shown.Number(absorptance.Peak)} sum to over 1; at most 1 is allowed.");
                return;
            }

            return;
        }

        int first = -1, last = -1;
        for (int i = 0; i < WavelengthGrid.Count; i++)
        {
            if (above.Samples[i] + absorptance.Samples[i] <= 1 + rounding)
                continue;
            first = first < 0 ? i : first;
            last = i;
        }

        if (first < 0)
            return;
        string range = first == last
            ? string.Create(CultureInfo.InvariantCulture, $"{WavelengthGrid.NmAt(first)} nm")
            : string.Create(CultureInfo.InvariantCulture, $"{WavelengthGrid.NmAt(first)} nm (and up to {WavelengthGrid.NmAt(last)} nm)");
        section.Fault(key,
            $"Above, reflectance {Shown.Number(above.Samples[first])} and absorptance {Shown.Number(absorptance.Samples[first])} sum to over 1 at {range}; at most 1 is allowed.");
    }
}
