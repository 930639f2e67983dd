using System.Globalization;
using Colorimetry;
using FilmOptics;
using FilmReports.Charts;

namespace FilmReports.Pages;

/// <summary>Rows of the summary of what the film file says, in the order light travels.</summary>
internal static class InputTables
{
    public static IEnumerable<IReadOnlyList<string>> Surroundings(FilmCase filmCase)
    {
        var film = filmCase.Film;
        yield return ["backlight: peak", $"{LightMarks.PeakNm(film.Backlight.Photons).ToString(CultureInfo.InvariantCulture)}\u2009nm"];
        yield return ["incidence", film.Backlight.Incidence.Kind.ToString().ToLowerInvariant()];
        if (film.Backlight.RadiantFluxW is { } watts)
            yield return ["radiant flux over the sheet", $"{Digits.Significant(watts, 4)}\u2009W"];
        yield return ["reflectance below", Range(film.Cavity.BelowReflectance)];
        yield return ["reflectance above", film.Cavity.AboveReflectanceByAngle is { } byAngle
            ? $"by angle, {Digits.Fixed(byAngle.LambertianMean, 3)} for Lambertian light"
            : Range(film.Cavity.AboveReflectance)];
        yield return ["absorptance above", Range(film.Cavity.AboveAbsorptance)];
        yield return ["source that misses the film", Digits.Percent(film.Cavity.BypassShare)];
        if (film.Sheet is { } sheet)
            yield return ["sheet", sheet.HeightMm is { } height ? $"{Digits.Significant(sheet.WidthMm, 6)} × {Digits.Significant(height, 6)}\u2009mm" : $"{Digits.Significant(sheet.WidthMm, 6)}\u2009mm wide"];
        if (filmCase.Panel is { } panel)
            yield return ["pixel area: red, green, blue", $"{Digits.Fixed(panel.RedAreaShare, 3)}, {Digits.Fixed(panel.GreenAreaShare, 3)}, {Digits.Fixed(panel.BlueAreaShare, 3)}"];
        if (filmCase.Target is not { } target)
            yield break;
        yield return ["target white", $"x {Digits.Fixed(target.WhiteX, 4)}, y {Digits.Fixed(target.WhiteY, 4)} at the {(target.Place == TargetPlace.Panel ? "panel" : "film")}, {(target.View == TargetView.Normal ? "along the normal" : "hemisphere")}"];
        yield return ["tolerance in xy", Digits.Significant(target.ToleranceXy, 3)];
    }

    public static IEnumerable<IReadOnlyList<string>> Layers(Film film)
    {
        int source = film.Backlight.Photons.Samples.IndexOf(film.Backlight.Photons.Peak);
        return film.Layers.Select(layer => (IReadOnlyList<string>)
        [
            layer.Name, Digits.Fixed(layer.ThicknessMm * 1000, 1), Digits.Fixed(layer.RefractiveIndex, 3),
            Digits.Significant(layer.HostAbsorption.Samples[source], 3), Digits.Significant(layer.Scattering.Samples[source], 3),
            Digits.Significant(layer.Anisotropy.Samples[source], 3), Digits.Fixed(layer.HostDensityGPerMl, 3),
        ]);
    }

    public static IEnumerable<IReadOnlyList<string>> Lots(Film film) => film.Lots.Select(lot => (IReadOnlyList<string>)
    [
        lot.Name, LightMarks.PeakNm(lot.Emission).ToString(CultureInfo.InvariantCulture), Digits.Fixed(lot.QuantumYieldShare, 3),
        Digits.Fixed(lot.FilmYieldShare, 3), Digits.Fixed(lot.FilmExtinctionFactor, 3), Digits.Fixed(lot.FilmEmissionShiftNm, 1), Digits.Fixed(lot.DensityGPerMl, 2),
    ]);

    private static string Range(Spectrum<Fraction> share)
    {
        double low = share.Samples[0], high = low;
        foreach (double value in share.Samples)
            (low, high) = (Math.Min(low, value), Math.Max(high, value));
        return high - low < 5e-4 ? Digits.Fixed(high, 3) : $"{Digits.Fixed(low, 3)}–{Digits.Fixed(high, 3)}";
    }
}
