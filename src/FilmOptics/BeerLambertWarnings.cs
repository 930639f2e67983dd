using System.Globalization;

namespace FilmOptics;

/// <summary>What of a film file the quick model did not use.</summary>
internal static class BeerLambertWarnings
{
    public static IReadOnlyList<string> For(Film film)
    {
        var unused = new List<string>();
        if (film.Layers.Any(layer => layer.Scattering.Peak > 0))
            unused.Add("scattering_per_mm and anisotropy");
        if (film.Layers.Any(layer => layer.RefractiveIndex > 1))
            unused.Add("refractive_index (but for the default path lengths)");
        if (film.Layers.Count > 1)
            unused.Add("the order of the layers (they are mixed into one)");
        if (film.Backlight.Incidence.Kind == IncidenceKind.Profile)
            unused.Add("incidence (but for the default path length)");
        if (film.Sheet is not null)
            unused.Add("sheet (no light is guided to its edges)");
        var warnings = new List<string>();
        if (unused.Count > 0)
            warnings.Add($"The Beer–Lambert model did not use {string.Join("; ", unused)}.");
        if (film.Cavity.AboveReflectanceByAngle is { LambertianMean: var mean })
        {
            warnings.Add(string.Create(
                CultureInfo.InvariantCulture,
                $"The Beer–Lambert model took the return above at its Lambertian mean, {mean:0.0000}, at every angle."));
        }

        return warnings;
    }
}
