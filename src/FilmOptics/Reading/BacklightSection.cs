using Colorimetry;

namespace FilmOptics.Reading;

/// <summary>Reads `backlight`.</summary>
internal static class BacklightSection
{
    private const double TailShare = 1e-3;

    public static Backlight? Read(Section section, SpectrumLoader loader)
    {
        var photons = Photons(section, loader);
        var incidence = Incidence(section, loader);
        double? fluxW = section.OptionalNumber("radiant_flux_w", NumberRule.AboveZero);
        section.Close();
        // Where there is light stays known without the incidence; a fault keeps the rest from use.
        return photons is null ? null : new(photons, incidence ?? FilmOptics.Incidence.Lambertian, fluxW);
    }

    private static Spectrum<PhotonPerNm>? Photons(Section section, SpectrumLoader loader)
    {
        // The shape may stand in backlight itself or under spectrum, where --set finds both forms at one key.
        bool isShapeHere = section.Has("peak_nm") | section.Has("fwhm_nm");
        var value = section.Find("spectrum");
        if (isShapeHere && value is not null)
        {
            section.Fault("spectrum", $"{section.PathOf("spectrum")} and peak_nm with fwhm_nm both give the spectrum; give one of them.");
            return null;
        }

        if (isShapeHere)
            return Shape(section);
        if (section.Required("spectrum") is null)
            return null;
        if (value is not MappingNode mapping || (mapping.Find("peak_nm") is null && mapping.Find("fwhm_nm") is null))
            return loader.Light(value!, section.PathOf("spectrum"), SpectrumKind.Light, 0);
        var shape = new Section(mapping, section.PathOf("spectrum"), section.Faults);
        if (shape.Has("file"))
            shape.Fault("file", $"{shape.PathOf("file")} and peak_nm with fwhm_nm both give the spectrum; give one of them.");
        var light = Shape(shape);
        shape.Close();
        return light;
    }

    // A line of Gaussian power, as a spectrometer shows it.
    private static Spectrum<PhotonPerNm>? Shape(Section section)
    {
        double peakNm = section.RequiredNumber("peak_nm", NumberRule.ShapePeakNm);
        double fwhmNm = section.RequiredNumber("fwhm_nm", NumberRule.AboveZero);
        double shiftNm = section.Number("shift_nm", NumberRule.ShiftNm, 0);
        double atNm = peakNm + shiftNm;
        if (!double.IsFinite(atNm) || double.IsNaN(fwhmNm))
            return null;
        double reachNm = fwhmNm / 2 * Math.Sqrt(Math.Log2(1 / TailShare));
        if (atNm - reachNm < WavelengthGrid.FirstNm || atNm + reachNm > WavelengthGrid.LastNm)
        {
            section.Fault("fwhm_nm",
                $"The line at {Shown.Number(atNm)} nm, {Shown.Number(fwhmNm)} nm wide, is over 0.1 % of its peak from "
                + $"{Shown.Number(atNm - reachNm)} to {Shown.Number(atNm + reachNm)} nm; {WavelengthGrid.FirstNm} to {WavelengthGrid.LastNm} nm is allowed.");
            return null;
        }

        var power = Spectrum.Gaussian<WattPerNm>(atNm, fwhmNm);
        if (power.Integral > 0)
            return power.ToPhotons().NormalisedToUnitSum();
        section.Fault("fwhm_nm", $"{section.PathOf("fwhm_nm")} is {Shown.Number(fwhmNm)}; the line misses every sample of the 1 nm grid.");
        return null;
    }

    private static Incidence? Incidence(Section section, SpectrumLoader loader)
    {
        var value = section.Find("incidence");
        switch (value)
        {
            case null:
            case ScalarNode { Text: "lambertian" }:
                return FilmOptics.Incidence.Lambertian;
            case ScalarNode { Text: "normal" }:
                return FilmOptics.Incidence.Normal;
            case ScalarNode { IsNull: false } name when !name.Text.Contains('.', StringComparison.Ordinal):
                section.WordOf(value, section.PathOf("incidence"), "lambertian", "normal", "a CSV file");
                return null;
        }

        var table = loader.ByAngle(value, section.PathOf("incidence"), SpectrumKind.ByAngle, "radiance");
        if (table is null)
            return null;
        if (table.Values.IndexOfAnyExcept(0) < 0)
        {
            section.Fault("incidence", $"{section.PathOf("incidence")}: the radiance is 0 at every angle; some has to be above 0.");
            return null;
        }

        return new(IncidenceKind.Profile, table);
    }
}
